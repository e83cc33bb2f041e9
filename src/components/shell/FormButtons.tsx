interface FormButtonsProps {
  /** what the first button does, in its words */
  words: string;
  sending: boolean;
  onClose: () => void;
}

/** What ends a form that opens in its place: send it, or leave everything as it was. */
export function FormButtons({ words, sending, onClose }: FormButtonsProps) {
  return (
    <div className="flex gap-2">
      <button type="submit" disabled={sending} className="button button-first">
        {sending ? 'Sending…' : words}
      </button>
      <button type="button" onClick={onClose} className="button">
        Cancel
      </button>
    </div>
  );
}
