import { useId, useState, type FormEvent } from 'react';
import { acknowledgeSchema, warningSchema, type Warning } from '../../contract/warning';
import { apiRequest, RequestRefused } from '../shell/api-request';

interface AcknowledgeFormProps {
  warning: Pick<Warning, 'id' | 'kind' | 'lineName'>;
  onAcknowledged: (warning: Warning) => void;
  onCancel: () => void;
}

/** A note and the act. What is wrong is said beside the field; what was typed stays. */
export function AcknowledgeForm({ warning, onAcknowledged, onCancel }: AcknowledgeFormProps) {
  const id = useId();
  const [note, setNote] = useState('');
  const [problem, setProblem] = useState<string>();
  const [sending, setSending] = useState(false);
  const send = async (event: FormEvent) => {
    event.preventDefault();
    const checked = acknowledgeSchema.safeParse({ note });
    if (!checked.success) return setProblem(checked.error.issues[0]?.message);
    setSending(true);
    setProblem(undefined);
    try {
      onAcknowledged(await acknowledge(warning.id, checked.data.note));
    } catch (error) {
      setProblem(problemWords(error));
      setSending(false);
    }
  };
  return (
    <form
      noValidate
      onSubmit={(event) => void send(event)}
      onKeyDown={(event) => event.key === 'Escape' && onCancel()}
      className="grid w-full max-w-[28rem] gap-1.5"
    >
      <label htmlFor={id} className="text-caption text-ink-2">
        Note: what you saw or did, and whom you called
      </label>
      <textarea
        id={id}
        rows={2}
        value={note}
        autoFocus
        maxLength={1000}
        aria-invalid={problem !== undefined}
        aria-describedby={`${id}-problem`}
        onChange={(event) => setNote(event.target.value)}
        className="field w-full py-1"
      />
      <p id={`${id}-problem`} role="alert" className="field-problem text-caption empty:hidden">
        {problem}
      </p>
      <div className="flex gap-2">
        <button
          type="submit"
          disabled={sending}
          className="button button-first"
          aria-label={`Acknowledge ${warning.kind} on ${warning.lineName} with this note`}
        >
          {sending ? 'Sending…' : 'Acknowledge'}
        </button>
        <button type="button" onClick={onCancel} className="button">
          Cancel
        </button>
      </div>
    </form>
  );
}

const acknowledge = (id: number, note: string): Promise<Warning> =>
  apiRequest(`/api/warnings/${id}/acknowledge`, { answer: warningSchema, method: 'POST', body: { note } });

function problemWords(error: unknown): string {
  if (!(error instanceof RequestRefused)) return 'The note could not be sent.';
  return error.fields.find(({ field }) => field === 'note')?.problem ?? error.message;
}
