import { useId } from 'react';
import type { WorkProblems, WorkTyped } from '../../view/work-typed';
import { FieldProblem } from '../shell/FieldProblem';

interface WorkFieldsProps {
  typed: WorkTyped;
  problems: WorkProblems;
  /** today by the site's clock, the latest day */
  today: string;
  /** the line's terminals to choose from; none where they are not known here */
  terminals: readonly { readonly key: string; readonly name: string }[];
  whatLabel: string;
  onType: (change: Partial<WorkTyped>) => void;
}

/** What was done, when and where. */
export function WorkFields({ typed, problems, today, terminals, whatLabel, onType }: WorkFieldsProps) {
  const id = useId();
  return (
    <>
      <label htmlFor={`${id}-what`} className="text-caption text-ink-2">
        {whatLabel}
      </label>
      <textarea
        id={`${id}-what`}
        rows={2}
        value={typed.what}
        autoFocus
        maxLength={500}
        aria-invalid={problems.what !== undefined}
        aria-describedby={`${id}-what-problem`}
        onChange={(event) => onType({ what: event.target.value })}
        className="field -mt-0.5 w-full py-1"
      />
      <FieldProblem id={`${id}-what-problem`} words={problems.what} />
      <div className="flex flex-wrap gap-x-4 gap-y-2">
        <label className="grid gap-0.5 text-caption text-ink-2">
          Done on
          <input
            type="date"
            value={typed.doneOn}
            max={today}
            aria-invalid={problems.doneOn !== undefined}
            aria-describedby={`${id}-done-problem`}
            onChange={(event) => onType({ doneOn: event.target.value })}
            className="field text-body"
          />
        </label>
        {terminals.length > 0 && (
          <label className="grid gap-0.5 text-caption text-ink-2">
            Where
            <select
              value={typed.terminal}
              onChange={(event) => onType({ terminal: event.target.value })}
              className="field text-body"
            >
              <option value="">the line, or several ends</option>
              {terminals.map(({ key, name }) => (
                <option key={key} value={key}>
                  {name}
                </option>
              ))}
            </select>
          </label>
        )}
      </div>
      <FieldProblem id={`${id}-done-problem`} words={problems.doneOn ?? problems.terminal} />
      <FieldProblem id={`${id}-problem`} words={problems.whole} />
    </>
  );
}
