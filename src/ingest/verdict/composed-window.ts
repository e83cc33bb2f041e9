import type { CompositionOnWire } from '../../contract/composition';
import { type Composition, composition } from '../../standing/composition';
import { type CompositionSums, totalOf } from '../../standing/composition-sums';
import { compositionOnWire } from '../../view/composition-on-wire';
import { dateOfDay, type SummedDay } from '../../view/day-sums';
import type { RosterLine } from '../roster';

/** Days since the epoch, the last one not among them. */
export interface DayRange {
  readonly from: number;
  readonly to: number;
}

export interface ComposedWindow {
  readonly range: DayRange;
  readonly composition: Composition;
  readonly onWire: CompositionOnWire;
  readonly total: CompositionSums | undefined;
}

/** How the days of a phase are composed. */
export interface Composing {
  readonly line: RosterLine;
  readonly days: readonly SummedDay[];
  readonly frequencyHz: number;
  /** what the scheme in force takes out of the differential already */
  readonly compensatedMillisiemens: number;
}

/** The composition of one phase over some of its days. */
export function composedWindow(
  { line, days, frequencyHz, compensatedMillisiemens }: Composing,
  range: DayRange,
): ComposedWindow {
  const sums = days.flatMap(({ day, sums: ofDay }) => (day >= range.from && day < range.to ? [ofDay] : []));
  const found = composition(sums, { frequencyHz });
  const window = { from: dateOfDay(range.from), to: dateOfDay(range.to), sums };
  const onWire = compositionOnWire(found, window, {
    line: line.register,
    frequencyHz,
    compensatedMillisiemens,
  });
  return { range, composition: found, onWire, total: totalOf(sums) };
}
