import { useState, type FormEvent } from 'react';
import type { FollowUpInFull } from '../../contract/follow-ups';
import { followUpDoneSchema, type FollowUpDone } from '../../contract/works';
import { workProblems, type WorkProblems, type WorkTyped } from '../../view/work-typed';
import { WorkFields } from '../works/WorkFields';
import { FormButtons } from '../shell/FormButtons';
import { fieldsOf, useSending } from '../shell/use-sending';

interface EndFormProps {
  followUp: FollowUpInFull;
  today: string;
  onEnd: (followUp: FollowUpInFull, done: FollowUpDone) => Promise<void>;
  onClose: () => void;
}

/** Ends a follow-up, with what was done on the line where that may have moved its standing level. */
export function EndForm({ followUp, today, onEnd, onClose }: EndFormProps) {
  const [typed, setTyped] = useState<WorkTyped>({ what: '', doneOn: today, terminal: '' });
  const [problems, setProblems] = useState<WorkProblems>({});
  const { sending, send } = useSending('The follow-up could not be ended.');
  const end = async (event: FormEvent) => {
    event.preventDefault();
    const { what, doneOn } = typed;
    const terminal = typed.terminal || null;
    const work = what.trim() === '' ? null : { what, doneOn, terminal };
    const checked = followUpDoneSchema.safeParse({ work });
    if (!checked.success) return setProblems(workProblems(fieldsOf(checked.error.issues)));
    setProblems({});
    const refused = await send(() => onEnd(followUp, checked.data));
    if (refused !== undefined) setProblems(workProblems(refused));
  };
  return (
    <form
      noValidate
      onSubmit={(event) => void end(event)}
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
      aria-label={`Done: ${followUp.note}, ${followUp.lineName}`}
      className="grid w-full max-w-[32rem] gap-2 border-l-2 border-rule pl-3"
    >
      <WorkFields
        {...{ typed, problems, today }}
        terminals={followUp.terminals}
        whatLabel="What was done on the line; leave it empty where nothing was"
        onType={(change) => setTyped((before) => ({ ...before, ...change }))}
      />
      <FormButtons
        words={typed.what.trim() === '' ? 'End the follow-up' : 'End it and record the work'}
        sending={sending}
        onClose={onClose}
      />
    </form>
  );
}
