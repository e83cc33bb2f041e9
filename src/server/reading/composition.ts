import type { CompositionOnWire, LineComposition } from '../../contract/composition';
import type { Comparison } from '../../contract/standing';
import { perPhase, PHASES, type PhaseName } from '../../protection/phase';
import { modulus } from '../../standing/complex';
import { composition } from '../../standing/composition';
import { shrunkCoefficients } from '../../standing/composition-fit';
import { totalOf } from '../../standing/composition-sums';
import { mannWhitney } from '../../standing/mann-whitney';
import { compositionPolygon } from '../../standing/operating-point';
import { median } from '../../standing/quantile';
import { type LevelRow, readLevels } from '../../store/levels';
import { readRegisterLine, type RegisteredLine, settingsInForce } from '../../store/register';
import { readVerdictsOfLine } from '../../store/standing';
import { compositionOnWire } from '../../view/composition-on-wire';
import { dateOfDay, type SummedDay, summedDays } from '../../view/day-sums';
import { compensatedMillisiemens } from '../../view/line-zone';
import type { Site } from '../site';

interface Window {
  readonly from: Date;
  readonly to: Date;
}

const DAY_MS = 86_400_000;
const COMPARED_DAYS = 180;
/** A day is looked at with a week on either side of it. */
const AROUND_DAYS = 7;
const WHOLE_WEIGHT = 0.001;

/** What every phase consists of over a window of days; undefined when the register does not hold the line. */
export async function readComposition(
  site: Site,
  key: string,
  window: Window,
): Promise<LineComposition | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const rows = await readLevels(site.store, 'day', { lineIds: [line.id], ...window });
  const frequencyHz = site.settings.NOMINAL_FREQUENCY_HZ;
  const compensated = compensatedNow(site, line);
  const daysOf = (phase: PhaseName) => summedDays(rows, phase, compensated);
  const verdicts = await readVerdictsOfLine(site.store, line.id);
  const steps = new Map(verdicts.map(({ phase, step }) => [phase, step?.at]));
  return {
    line: key,
    phases: perPhase((phase) => composed(daysOf(phase), { line, window, frequencyHz, compensated })),
    history: PHASES.flatMap((phase) =>
      sides(daysOf(phase), steps.get(phase)).flatMap((days) => history(days, { phase, frequencyHz })),
    ),
  };
}

interface ComposedOf {
  readonly line: RegisteredLine;
  readonly window: Window;
  readonly frequencyHz: number;
  readonly compensated: number;
}

/** What the scheme in force now takes out of the differential, millisiemens. */
function compensatedNow({ settings, now }: Site, line: RegisteredLine): number {
  return compensatedMillisiemens(line, {
    isCompensated: settingsInForce(line.settings, now())?.chargingCompensation === true,
    frequencyHz: settings.NOMINAL_FREQUENCY_HZ,
  });
}

function composed(
  days: readonly SummedDay[],
  { line, window, frequencyHz, compensated }: ComposedOf,
): CompositionOnWire {
  const sums = days.map((each) => each.sums);
  const dates = { from: window.from.toISOString().slice(0, 10), to: window.to.toISOString().slice(0, 10) };
  if (line.goesBy === 'reported')
    return {
      kind: 'not separable',
      ...dates,
      days: 0,
      snapshotCount: 0,
      reason:
        'This feed holds magnitudes alone; what a differential consists of can’t be told from it. Phasors of every terminal would tell.',
    };
  return compositionOnWire(
    composition(sums, { frequencyHz }),
    { ...dates, sums },
    { line, frequencyHz, compensatedMillisiemens: compensated },
  );
}

/** The days before a step and those after it; the day itself is half of each and belongs to neither. */
function sides(days: readonly SummedDay[], stepAt: string | undefined): SummedDay[][] {
  if (stepAt === undefined) return [[...days]];
  const stepDay = Math.floor(Date.parse(stepAt) / DAY_MS);
  return [days.filter(({ day }) => day < stepDay), days.filter(({ day }) => day > stepDay)];
}

/**
 * The causes day by day: each day by the composition of the days around it, drawn a little towards that of the whole
 * window, so that a drift shows in its own term and a day with a steady load has its shares as well.
 */
function history(
  days: readonly SummedDay[],
  { phase, frequencyHz }: { phase: PhaseName; frequencyHz: number },
): LineComposition['history'] {
  const whole = composition(
    days.map(({ sums }) => sums),
    { frequencyHz },
  );
  if (whole.kind === 'not separable') return [];
  return days.flatMap(({ day, sums }) => {
    const near = totalOf(
      days.flatMap((each) => (Math.abs(each.day - day) <= AROUND_DAYS ? [each.sums] : [])),
    );
    const coefficients =
      near && shrunkCoefficients(near, { prior: whole.coefficients, weight: WHOLE_WEIGHT });
    const polygon = coefficients && compositionPolygon(sums, { shape: whole.shape, coefficients });
    if (polygon === undefined) return [];
    return [
      {
        day: dateOfDay(day),
        phase,
        chargingAmps: modulus(polygon.chargingAmps),
        ratioAmps: modulus(polygon.ratioAmps),
        angleAmps: modulus(polygon.angleAmps),
        restAmps: modulus(polygon.restAmps),
        differentialAmps: modulus(polygon.differentialAmps),
      },
    ];
  });
}

/** Both sides of a date, half a year at the most on each; the day itself belongs to neither. */
export async function readComparison(site: Site, key: string, at: string): Promise<Comparison | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const compensated = compensatedNow(site, line);
  const atMs = Date.parse(`${at}T00:00:00Z`);
  const frequencyHz = site.settings.NOMINAL_FREQUENCY_HZ;
  const side = async (window: Window) => ({
    window,
    rows: await readLevels(site.store, 'day', { lineIds: [line.id], ...window }),
  });
  const before = await side({ from: new Date(atMs - COMPARED_DAYS * DAY_MS), to: new Date(atMs) });
  const after = await side({ from: new Date(atMs + DAY_MS), to: new Date(atMs + COMPARED_DAYS * DAY_MS) });
  return {
    line: key,
    at,
    phases: PHASES.map((phase) => {
      const [earlier, later] = [before, after].map(({ rows, window }) => ({
        levels: levelsOf(rows, phase),
        composition: composed(summedDays(rows, phase, compensated), {
          line,
          window,
          frequencyHz,
          compensated,
        }),
      }));
      return {
        phase,
        before: summary(earlier!),
        after: summary(later!),
        test: shiftTest(earlier!.levels, later!.levels),
      };
    }),
  };
}

const levelsOf = (rows: readonly LevelRow[], phase: PhaseName): number[] =>
  rows.flatMap((row) => (row.phase === phase && row.medianAmps !== null ? [row.medianAmps] : []));

const summary = ({ levels, composition: told }: { levels: number[]; composition: CompositionOnWire }) => ({
  days: levels.length,
  medianAmps: median(levels) ?? null,
  composition: told,
});

function shiftTest(before: number[], after: number[]): Comparison['phases'][number]['test'] {
  const found = mannWhitney(before, after);
  if (found?.limits === undefined) return null;
  return { pTwoSided: found.pTwoSided, shiftAmps: { value: found.shift, ...found.limits } };
}
