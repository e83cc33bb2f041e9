import type { ReplayLine } from '../../view/replay-problems';
import type { ReplayTyped } from '../../view/replay-typed';
import { Choice } from '../charts/Choice';

interface Props {
  readonly line: ReplayLine;
  readonly typed: ReplayTyped;
  readonly problems: Readonly<Record<string, string>>;
  readonly set: (name: string) => (value: string) => void;
}

const STARTS = [
  { value: 'from-zero', label: 'aimed at zero' },
  { value: 'from-pickup', label: 'on top of the pickup' },
];
const RESTRAINTS = [
  { value: 'scaled-sum', label: 'a share of the sum' },
  { value: 'maximum', label: 'the greatest' },
];

/** The conventions of a two-slope scheme: where its first slope starts and what its restraint is formed from. */
export function RestraintChoice({ line, typed, problems, set }: Props) {
  return (
    <div className="grid gap-2">
      <div>
        <p className="text-caption text-ink-2">The first slope is</p>
        <Choice
          legend="The first slope is"
          name="slopeStart"
          value={typed.slopeStart ?? 'from-zero'}
          options={STARTS}
          onChoose={set('slopeStart')}
        />
      </div>
      <div>
        <p className="text-caption text-ink-2">The restraint current is</p>
        <Choice
          legend="The restraint current is"
          name="restraintKind"
          value={typed.restraintKind ?? 'scaled-sum'}
          options={RESTRAINTS}
          onChoose={set('restraintKind')}
        />
        {line.goesBy === 'reported' && (
          <p className="mt-0.5 text-caption text-ink-2">
            This line’s feed holds the restraint as a terminal reported it: another convention changes nothing
            here.
          </p>
        )}
      </div>
      {typed.restraintKind === 'scaled-sum' && (
        <div className="flex items-baseline gap-2">
          <label htmlFor="replay-factor" className="text-caption text-ink-2">
            Share of the sum
          </label>
          <input
            id="replay-factor"
            value={typed.factor ?? ''}
            inputMode="decimal"
            autoComplete="off"
            aria-invalid={problems.factor !== undefined}
            aria-describedby="replay-factor-problem"
            onChange={(event) => set('factor')(event.target.value)}
            className="field w-20"
          />
        </div>
      )}
      <p id="replay-factor-problem" role="alert" className="field-problem text-caption empty:hidden">
        {problems.factor ?? problems.restraintKind}
      </p>
    </div>
  );
}
