import { useId, useState, type FormEvent } from 'react';
import type { Proposal } from '../../contract/replay';
import { RequestRefused } from '../shell/api-request';
import { keepProposal } from './replay-requests';

interface Props {
  readonly line: string;
  readonly replay: string;
  readonly onKept: (proposal: Proposal) => void;
}

/** A note and the act: these settings with their figures as a proposal. What was typed stays when it fails. */
export function KeepProposal({ line, replay, onKept }: Props) {
  const id = useId();
  const [note, setNote] = useState('');
  const [problem, setProblem] = useState<string>();
  const [sending, setSending] = useState(false);
  const [kept, setKept] = useState<Proposal>();
  const send = async (event: FormEvent) => {
    event.preventDefault();
    if (note.trim() === '') return setProblem('Say what the proposal is for.');
    setSending(true);
    setProblem(undefined);
    try {
      const proposal = await keepProposal(line, { replay, note });
      setKept(proposal);
      onKept(proposal);
    } catch (error) {
      const refused = error instanceof RequestRefused ? error : undefined;
      setProblem(refused?.fields[0]?.problem ?? refused?.message ?? 'The proposal could not be kept.');
    } finally {
      setSending(false);
    }
  };
  if (kept !== undefined)
    return (
      <p className="panel p-4" role="status">
        Kept as{' '}
        <a href={`/proposals/${kept.id}`} className="link">
          proposal {kept.id}
        </a>
        , with a sheet to print.
      </p>
    );
  return (
    <form
      noValidate
      onSubmit={(event) => void send(event)}
      className="panel grid gap-1.5 p-4 sm:p-[1.125rem]"
    >
      <h2 className="m-0 text-body font-semibold">Keep as a proposal</h2>
      <label htmlFor={id} className="text-caption text-ink-2">
        Note: what these settings are proposed for. A proposal is a copy with its figures; no device is set
        from it
      </label>
      <textarea
        id={id}
        rows={2}
        value={note}
        maxLength={500}
        aria-invalid={problem !== undefined}
        aria-describedby={`${id}-problem`}
        onChange={(event) => setNote(event.target.value)}
        className="field w-full max-w-[40rem] py-1"
      />
      <p id={`${id}-problem`} role="alert" className="field-problem text-caption empty:hidden">
        {problem}
      </p>
      <div>
        <button type="submit" className="button" disabled={sending}>
          {sending ? 'Keeping …' : 'Keep'}
        </button>
      </div>
    </form>
  );
}
