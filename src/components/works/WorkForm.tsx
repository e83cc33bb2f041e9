import { useState, type FormEvent } from 'react';
import { newWorkSchema, type NewWork } from '../../contract/works';
import { workProblems, type WorkProblems, type WorkTyped } from '../../view/work-typed';
import { RequestRefused } from '../shell/api-request';
import { WorkFields } from './WorkFields';
import { FormButtons } from '../shell/FormButtons';

interface WorkFormProps {
  line: { readonly key: string; readonly name: string };
  terminals: readonly { readonly key: string; readonly name: string }[];
  today: string;
  onSend: (work: NewWork) => Promise<void>;
  onClose: () => void;
}

/** Records work. What is wrong is said beside the field; what was typed stays. */
export function WorkForm({ line, terminals, today, onSend, onClose }: WorkFormProps) {
  const [typed, setTyped] = useState<WorkTyped>({ what: '', doneOn: today, terminal: '' });
  const [problems, setProblems] = useState<WorkProblems>({});
  const [sending, setSending] = useState(false);
  const send = async (event: FormEvent) => {
    event.preventDefault();
    const checked = newWorkSchema.safeParse({ ...typed, line: line.key, terminal: typed.terminal || null });
    if (!checked.success) return setProblems(workProblems(fieldsOf(checked.error.issues)));
    setSending(true);
    setProblems({});
    try {
      await onSend(checked.data);
      onClose();
    } catch (error) {
      setProblems(refusedProblems(error));
      setSending(false);
    }
  };
  return (
    <form
      noValidate
      onSubmit={(event) => void send(event)}
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
      aria-label={`Work on ${line.name}`}
      className="mt-2 grid w-full max-w-[32rem] gap-2 border-l-2 border-rule pl-3"
    >
      <WorkFields
        {...{ typed, problems, today, terminals }}
        whatLabel="What was done"
        onType={(change) => setTyped((before) => ({ ...before, ...change }))}
      />
      <FormButtons words="Record the work" sending={sending} onClose={onClose} />
    </form>
  );
}

export const fieldsOf = (issues: readonly { path: readonly PropertyKey[]; message: string }[]) =>
  issues.map(({ path, message }) => ({ field: path.map(String).join('.'), problem: message }));

/** What an endpoint said is wrong, beside its fields where it named any. */
export function refusedProblems(error: unknown): WorkProblems {
  if (error instanceof RequestRefused && error.fields.length > 0) return workProblems(error.fields);
  return { whole: error instanceof Error ? error.message : 'The work could not be recorded.' };
}
