import { useState, type FormEvent } from 'react';
import { newWorkSchema, type NewWork } from '../../contract/works';
import { workProblems, type WorkProblems, type WorkTyped } from '../../view/work-typed';
import { WorkFields } from './WorkFields';
import { FormButtons } from '../shell/FormButtons';
import { fieldsOf, useSending } from '../shell/use-sending';

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
  const { sending, send } = useSending('The work could not be recorded.');
  const submit = async (event: FormEvent) => {
    event.preventDefault();
    const checked = newWorkSchema.safeParse({ ...typed, line: line.key, terminal: typed.terminal || null });
    if (!checked.success) return setProblems(workProblems(fieldsOf(checked.error.issues)));
    setProblems({});
    const refused = await send(() => onSend(checked.data));
    if (refused === undefined) onClose();
    else setProblems(workProblems(refused));
  };
  return (
    <form
      noValidate
      onSubmit={(event) => void submit(event)}
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
