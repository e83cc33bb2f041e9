import type { Comparison, StandingVerdict } from '../../contract/standing';
import { PHASES, type PhaseName } from '../../protection/phase';
import type { SeparatedComposition } from '../../standing/composition';
import { throughLoad, totalOf } from '../../standing/composition-sums';
import { levelShift } from '../../standing/level-shift';
import { typicalPoint } from '../../standing/operating-point';
import { median } from '../../standing/quantile';
import { levelsAtReferenceLoad } from '../../standing/reference-level';
import { type LevelRow, readLevels } from '../../store/levels';
import { readRegisterLine } from '../../store/register';
import { readVerdictsOfLine } from '../../store/standing';
import { readWorksOfLine } from '../../store/works';
import { type SummedDay, summedDays } from '../../view/day-sums';
import type { Site } from '../site';
import { compensatedNow, type Composed, composed, type ComposedOf, type Window } from './composition';

type ComparedPhase = Comparison['phases'][number];

const DAY_MS = 86_400_000;
const COMPARED_DAYS = 180;
/** A mark within a day of the date is what the date is about. */
const SAME_DAYS = 1;

/** Both sides of a date, each to the next mark and half a year at the most; the day itself belongs to neither. */
export async function readComparison(site: Site, key: string, at: string): Promise<Comparison | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const atMs = Date.parse(`${at}T00:00:00Z`);
  const rows = await readLevels(site.store, 'day', {
    lineIds: [line.id],
    from: new Date(atMs - COMPARED_DAYS * DAY_MS),
    to: new Date(atMs + COMPARED_DAYS * DAY_MS),
  });
  const [verdicts, works] = await Promise.all([
    readVerdictsOfLine(site.store, line.id),
    readWorksOfLine(site.store, line.id),
  ]);
  const compared = {
    line,
    frequencyHz: site.settings.NOMINAL_FREQUENCY_HZ,
    compensated: compensatedNow(site, line),
  };
  return {
    line: key,
    at,
    phases: PHASES.map((phase) => {
      const found = verdicts.find((verdict) => verdict.phase === phase)?.marks ?? [];
      // works as they are recorded now: the verdict’s are as old as the last look, and one may be withdrawn since
      const others = found.filter(({ kind }) => kind !== 'work recorded');
      const windows = comparedWindows(atMs, [...others, ...works.map(({ doneOn }) => ({ on: doneOn }))]);
      return comparedPhase(phase, { rows, windows, compared });
    }),
  };
}

interface BothSides {
  readonly before: Window;
  readonly after: Window;
}

/** Half a year on either side, or up to the nearest mark that is another one than the date’s own. */
export function comparedWindows(
  atMs: number,
  marks: readonly Pick<StandingVerdict['marks'][number], 'on'>[],
): BothSides {
  const others = marks
    .map(({ on }) => Date.parse(`${on}T00:00:00Z`))
    .filter((markMs) => Math.abs(markMs - atMs) > SAME_DAYS * DAY_MS);
  const earlier = Math.max(-Infinity, ...others.filter((markMs) => markMs < atMs));
  const later = Math.min(Infinity, ...others.filter((markMs) => markMs > atMs));
  return {
    before: {
      from: new Date(Math.max(atMs - COMPARED_DAYS * DAY_MS, earlier + DAY_MS)),
      to: new Date(atMs),
    },
    after: {
      from: new Date(atMs + DAY_MS),
      to: new Date(Math.min(atMs + COMPARED_DAYS * DAY_MS, later)),
    },
  };
}

interface Side extends Composed {
  readonly levels: readonly number[];
  readonly days: readonly SummedDay[];
}

function comparedPhase(
  phase: PhaseName,
  {
    rows,
    windows,
    compared,
  }: { rows: readonly LevelRow[]; windows: BothSides; compared: Omit<ComposedOf, 'window'> },
): ComparedPhase {
  const side = (window: Window): Side => {
    const own = rows.filter(
      (row) => row.phase === phase && row.start >= window.from && row.start < window.to,
    );
    const days = summedDays(own, phase, compared.compensated);
    return {
      levels: own.flatMap(({ medianAmps }) => medianAmps ?? []),
      days,
      ...composed(days, { ...compared, window }),
    };
  };
  const [before, after] = [side(windows.before), side(windows.after)];
  return {
    phase,
    before: summary(before),
    after: summary(after),
    test: shiftTest(before.levels, after.levels),
    atReference: atOneLoad(before, after),
  };
}

const summary = ({ levels, onWire }: Side): ComparedPhase['before'] => ({
  days: levels.length,
  medianAmps: median(levels) ?? null,
  composition: onWire,
});

/** Both sides' levels at the typical load of both together, each by its own composition. */
function atOneLoad(before: Side, after: Side): ComparedPhase['atReference'] {
  const [early, late] = [before.fit, after.fit];
  if (early === undefined || late === undefined) return null;
  const sums = [...before.days, ...after.days].map((day) => day.sums);
  if (early.shape.terminalCount !== late.shape.terminalCount) return null;
  const total = totalOf(sums);
  const point = total && typicalPoint(total);
  const load = total && throughLoad(total);
  if (point === undefined || load === undefined) return null;
  const levelsOf = (side: Side, fit: SeparatedComposition) =>
    levelsAtReferenceLoad(side.days, fit, point).map(({ levelAmps }) => levelAmps);
  const levels = [levelsOf(before, early), levelsOf(after, late)] as const;
  return {
    throughAmps: load.meanAmps,
    beforeAmps: median(levels[0])!,
    afterAmps: median(levels[1])!,
    test: shiftTest(...levels),
  };
}

function shiftTest(before: readonly number[], after: readonly number[]): ComparedPhase['test'] {
  const found = levelShift(before, after);
  if (found?.limits === undefined) return null;
  return { pTwoSided: found.pTwoSided, shiftAmps: { value: found.shift, ...found.limits } };
}
