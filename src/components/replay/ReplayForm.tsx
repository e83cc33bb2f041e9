import type { FormEvent } from 'react';
import { KIND_OPTIONS, replayFields } from '../../view/replay-fields';
import { PERIOD_OPTIONS, type TypedPeriod } from '../../view/replay-period';
import type { ReplayLine } from '../../view/replay-problems';
import type { CharacteristicKind, ReplayTyped } from '../../view/replay-typed';
import { Choice } from '../charts/Choice';
import { FigureField } from './FigureField';
import { RestraintChoice } from './RestraintChoice';

interface Props {
  readonly line: ReplayLine;
  readonly typed: ReplayTyped;
  /** the settings in force in the same form; undefined when there are none */
  readonly recorded: ReplayTyped | undefined;
  readonly onTyped: (typed: ReplayTyped) => void;
  readonly period: TypedPeriod;
  readonly onPeriod: (period: TypedPeriod) => void;
  readonly problems: Readonly<Record<string, string>>;
  readonly busy: boolean;
  readonly mayReplay: boolean;
  readonly timeZone: string;
  readonly onRun: () => void;
}

/** A copy of the settings in force, to be changed, and the period to try them on. */
export function ReplayForm(props: Props) {
  const { line, typed, recorded, onTyped, problems, busy, mayReplay, onRun } = props;
  const kind = typed.kind as CharacteristicKind;
  const set = (name: string) => (value: string) => onTyped({ ...typed, [name]: value });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (mayReplay && !busy) onRun();
  };
  const fields = replayFields(kind, line);
  return (
    <form
      noValidate
      data-replay-form
      onSubmit={submit}
      className="panel grid gap-4 p-4 sm:p-[1.125rem]"
      aria-label="Settings and period of the replay"
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="m-0 text-body font-semibold">Settings to try</h2>
        {recorded !== undefined && (
          <button type="button" className="link cursor-pointer" onClick={() => onTyped(recorded)}>
            Back to the recorded ones
          </button>
        )}
      </div>
      <div>
        <Choice
          legend="Kind of characteristic"
          name="kind"
          value={kind}
          options={KIND_OPTIONS}
          onChoose={set('kind')}
        />
        <Problem name="kind" problems={problems} />
      </div>
      <div className="grid grid-cols-2 gap-x-4 gap-y-3">
        {fields.map((field, index) => (
          <FigureField
            key={field.name}
            field={field}
            heading={
              field.group !== undefined && field.group !== fields[index - 1]?.group ? field.group : undefined
            }
            value={typed[field.name] ?? ''}
            recorded={recorded?.kind === kind ? recorded[field.name] : undefined}
            problem={problems[field.name]}
            onType={set(field.name)}
          />
        ))}
        <Problem name="ctErrors" problems={problems} />
      </div>
      {kind === 'two-slope' && <RestraintChoice line={line} typed={typed} problems={problems} set={set} />}
      <div>
        <label className="flex items-baseline gap-2">
          <input
            type="checkbox"
            checked={typed.chargingCompensation === 'yes'}
            aria-invalid={problems.chargingCompensation !== undefined}
            aria-describedby="replay-chargingCompensation-problem"
            onChange={(event) => set('chargingCompensation')(event.target.checked ? 'yes' : '')}
            className="relative top-0.5 shrink-0 accent-(--accent)"
          />
          charging current compensated from the voltages
        </label>
        <Problem name="chargingCompensation" problems={problems} />
      </div>
      <PeriodFields {...props} />
      <div>
        <button
          type="submit"
          className={`button ${busy || !mayReplay ? '' : 'button-first'}`}
          disabled={busy || !mayReplay}
        >
          {busy ? 'Running …' : 'Run the replay'}
        </button>
        {!mayReplay && (
          <p className="mt-1.5 text-caption text-ink-2">Replays are run by engineers; you can read them.</p>
        )}
      </div>
    </form>
  );
}

function PeriodFields({ period, onPeriod, problems, timeZone }: Props) {
  const choose = (choice: TypedPeriod['choice']) => {
    onPeriod({ ...period, choice });
    const url = new URL(window.location.href);
    if (choice === '7d') url.searchParams.delete('period');
    else url.searchParams.set('period', choice);
    window.history.replaceState(window.history.state, '', url);
  };
  return (
    <div className="border-t border-hairline pt-3">
      <h2 className="m-0 mb-1 text-body font-semibold">Period</h2>
      <Choice
        legend="Period"
        name="period"
        value={period.choice}
        options={PERIOD_OPTIONS}
        onChoose={choose}
      />
      {period.choice === 'typed' && (
        <div className="mt-2 grid gap-2">
          {(['from', 'to'] as const).map((name) => (
            <div key={name}>
              <label htmlFor={`replay-${name}`} className="block text-caption text-ink-2">
                {name === 'from' ? 'From' : 'To'}, clock time of {timeZone}
              </label>
              <input
                id={`replay-${name}`}
                type="datetime-local"
                value={period[name]}
                aria-invalid={problems[name] !== undefined}
                aria-describedby={`replay-${name}-problem`}
                onChange={(event) => onPeriod({ ...period, [name]: event.target.value })}
                className="field mt-0.5 w-full"
              />
              <Problem name={name} problems={problems} />
            </div>
          ))}
        </div>
      )}
    </div>
  );
}

function Problem({ name, problems }: { name: string; problems: Readonly<Record<string, string>> }) {
  return (
    <p id={`replay-${name}-problem`} role="alert" className="field-problem mt-0.5 text-caption empty:hidden">
      {problems[name]}
    </p>
  );
}
