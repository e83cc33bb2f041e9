import { useId, useState, type FormEvent } from 'react';
import type { Problem } from '../../contract/problem';
import { CAUSES, newFollowUpSchema, type Cause, type FollowUp } from '../../contract/standing';
import { FieldProblem } from '../shell/FieldProblem';
import type { NewFollowUp } from './use-follow-ups';
import { FormButtons } from '../shell/FormButtons';
import { fieldsOf, useSending } from '../shell/use-sending';

interface FollowUpFormProps {
  line: { readonly key: string; readonly name: string };
  phase: FollowUp['phase'];
  /** the likely cause, to begin with */
  cause: Cause;
  /** today, the least due day */
  today: string;
  onSend: (opened: NewFollowUp) => Promise<void>;
  onClose: () => void;
}

type Problems = Readonly<Partial<Record<'note' | 'due' | 'whole', string>>>;

/** What is to be done, for what cause and until when. What is wrong is said beside the field; what was typed stays. */
export function FollowUpForm({ line, phase, cause: likely, today, onSend, onClose }: FollowUpFormProps) {
  const id = useId();
  const [note, setNote] = useState('');
  const [cause, setCause] = useState<Cause>(likely);
  const [due, setDue] = useState('');
  const [problems, setProblems] = useState<Problems>({});
  const { sending, send } = useSending('The follow-up could not be sent.');
  const submit = async (event: FormEvent) => {
    event.preventDefault();
    const opened = { line: line.key, phase, cause, due: due === '' ? null : due, note };
    const checked = newFollowUpSchema.safeParse(opened);
    if (!checked.success) return setProblems(problemsOf(fieldsOf(checked.error.issues)));
    setProblems({});
    const refused = await send(() => onSend(checked.data));
    if (refused === undefined) onClose();
    else setProblems(problemsOf(refused));
  };
  return (
    <form
      noValidate
      onSubmit={(event) => void submit(event)}
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
      aria-label={`Follow-up for ${line.name}`}
      className="mt-2 grid w-full max-w-[32rem] gap-2 border-l-2 border-rule pl-3"
    >
      <label htmlFor={`${id}-note`} className="text-caption text-ink-2">
        What is to be done
      </label>
      <textarea
        id={`${id}-note`}
        rows={2}
        value={note}
        autoFocus
        maxLength={1000}
        aria-invalid={problems.note !== undefined}
        aria-describedby={`${id}-note-problem`}
        onChange={(event) => setNote(event.target.value)}
        className="field -mt-0.5 w-full py-1"
      />
      <FieldProblem id={`${id}-note-problem`} words={problems.note} />
      <div className="flex flex-wrap gap-x-4 gap-y-2">
        <label className="grid gap-0.5 text-caption text-ink-2">
          Cause
          <select
            value={cause}
            onChange={(event) => setCause(CAUSES.find((one) => one === event.target.value) ?? 'not told')}
            className="field text-body"
          >
            {CAUSES.map((one) => (
              <option key={one} value={one}>
                {one}
              </option>
            ))}
          </select>
        </label>
        <label className="grid gap-0.5 text-caption text-ink-2">
          Due, if there is a day
          <input
            type="date"
            value={due}
            min={today}
            aria-invalid={problems.due !== undefined}
            aria-describedby={`${id}-due-problem`}
            onChange={(event) => setDue(event.target.value)}
            className="field text-body"
          />
        </label>
      </div>
      <FieldProblem id={`${id}-due-problem`} words={problems.due} />
      <FieldProblem id={`${id}-problem`} words={problems.whole} />
      <FormButtons words="Open the follow-up" sending={sending} onClose={onClose} />
    </form>
  );
}

function problemsOf(fields: Problem['fields']): Problems {
  const of = (name: string) => fields.find(({ field }) => field === name)?.problem;
  const note = of('note');
  const due = of('due') === undefined ? undefined : 'Give a day, such as 12 May 2027, or none.';
  const other = fields.find(({ field }) => field !== 'note' && field !== 'due')?.problem;
  return {
    ...(note === undefined ? {} : { note }),
    ...(due === undefined ? {} : { due }),
    ...(other === undefined ? {} : { whole: other }),
  };
}
