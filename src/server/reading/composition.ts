import type { CompositionOnWire, LineComposition } from '../../contract/composition';
import { perPhase, PHASES, type PhaseName } from '../../protection/phase';
import { modulus } from '../../standing/complex';
import { composition, type SeparatedComposition } from '../../standing/composition';
import { shrunkCoefficients } from '../../standing/composition-fit';
import { totalOf } from '../../standing/composition-sums';
import { compositionPolygon } from '../../standing/operating-point';
import { readLevels } from '../../store/levels';
import { readRegisterLine, type RegisteredLine, settingsInForce } from '../../store/register';
import { readVerdictsOfLine } from '../../store/standing';
import { compositionOnWire } from '../../view/composition-on-wire';
import { dateOfDay, type SummedDay, summedDays } from '../../view/day-sums';
import { compensatedMillisiemens } from '../../view/line-zone';
import type { Site } from '../site';

export interface Window {
  readonly from: Date;
  readonly to: Date;
}

const DAY_MS = 86_400_000;
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
    phases: perPhase((phase) => composed(daysOf(phase), { line, window, frequencyHz, compensated }).onWire),
    history: PHASES.flatMap((phase) =>
      sides(daysOf(phase), steps.get(phase)).flatMap((days) => history(days, { phase, frequencyHz })),
    ),
  };
}

export interface ComposedOf {
  readonly line: RegisteredLine;
  readonly window: Window;
  readonly frequencyHz: number;
  readonly compensated: number;
}

/** What the scheme in force now takes out of the differential, millisiemens. */
export function compensatedNow({ settings, now }: Site, line: RegisteredLine): number {
  return compensatedMillisiemens(line, {
    isCompensated: settingsInForce(line.settings, now())?.chargingCompensation === true,
    frequencyHz: settings.NOMINAL_FREQUENCY_HZ,
  });
}

/** A composition as it is published, and where it parts charging from mismatch what was fitted. */
export interface Composed {
  readonly onWire: CompositionOnWire;
  readonly fit: SeparatedComposition | undefined;
}

export function composed(
  days: readonly SummedDay[],
  { line, window, frequencyHz, compensated }: ComposedOf,
): Composed {
  const sums = days.map((each) => each.sums);
  const dates = { from: window.from.toISOString().slice(0, 10), to: window.to.toISOString().slice(0, 10) };
  if (line.goesBy === 'reported') return { onWire: { ...NOT_FROM_MAGNITUDES, ...dates }, fit: undefined };
  const found = composition(sums, { frequencyHz });
  const onWire = compositionOnWire(
    found,
    { ...dates, sums },
    { line, frequencyHz, compensatedMillisiemens: compensated },
  );
  const isTold = found.kind === 'separated' && onWire.kind === 'separated';
  return { onWire, fit: isTold ? found : undefined };
}

const NOT_FROM_MAGNITUDES = {
  kind: 'not separable',
  days: 0,
  snapshotCount: 0,
  reason:
    'This feed holds magnitudes alone; what a differential consists of can’t be told from it. Phasors of every terminal would tell.',
} as const;

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
