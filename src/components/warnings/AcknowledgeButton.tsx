import { useRef, useState, type ReactNode } from 'react';
import type { Warning } from '../../contract/warning';
import { AcknowledgeForm } from './AcknowledgeForm';

interface AcknowledgeButtonProps {
  warning: Warning;
  onAcknowledged: (warning: Warning) => void;
  /** what stands beside the button while the form is closed */
  beside?: ReactNode;
}

/** Opens the form in place. Cancelling gives the keyboard back to the button it came from. */
export function AcknowledgeButton({ warning, onAcknowledged, beside }: AcknowledgeButtonProps) {
  const [writing, setWriting] = useState(false);
  const cancelled = useRef(false);
  if (writing)
    return (
      <AcknowledgeForm
        warning={warning}
        onAcknowledged={onAcknowledged}
        onCancel={() => {
          cancelled.current = true;
          setWriting(false);
        }}
      />
    );
  return (
    <div className="flex gap-2">
      <button
        type="button"
        ref={(button) => {
          if (!cancelled.current || button === null) return;
          cancelled.current = false;
          button.focus();
        }}
        onClick={() => setWriting(true)}
        aria-label={`Acknowledge ${warning.kind} on ${warning.lineName}`}
        className="button"
      >
        Acknowledge
      </button>
      {beside}
    </div>
  );
}
