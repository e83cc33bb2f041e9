import { addSnapshot, emptySums, totalOf } from '../../../src/standing/composition-sums';
import type { CompositionSums } from '../../../src/standing/composition-sums';
import type { HourlyLevel } from '../../../src/standing/load-response';
import type { MeasuredHour } from './seeded-line';
import type { TeeHour } from './seeded-tee';

export function hourSums({ differential, voltageKv, second, throughAmps }: MeasuredHour): CompositionSums {
  const sums = emptySums({ terminalCount: 2, hasVoltage: true });
  addSnapshot(sums, {
    differentialAmps: differential,
    voltageKv,
    otherCurrentsAmps: [second],
    throughAmps,
  });
  return sums;
}

export function teeSums({ differential, voltageKv, others, throughAmps }: TeeHour): CompositionSums {
  const sums = emptySums({ terminalCount: 3, hasVoltage: true });
  addSnapshot(sums, {
    differentialAmps: differential,
    voltageKv,
    otherCurrentsAmps: others,
    throughAmps,
  });
  return sums;
}

/** Day rows of hour rows that begin with the first hour of a day. */
export const daysOf = (hours: readonly CompositionSums[]): CompositionSums[] =>
  Array.from({ length: hours.length / 24 }, (_, day) => totalOf(hours.slice(24 * day, 24 * day + 24))!);

/** How the terminal that reports forms its restraint. */
export type ReportedRestraint = 'half the sum' | 'the greatest';

/** What a feed of magnitudes holds of an hour: the differential, and the through current that its restraint tells. */
export function reportedHour(
  { hour, first, second, differential }: MeasuredHour,
  restraint: ReportedRestraint,
): HourlyLevel {
  const ends = [Math.hypot(first.re, first.im), Math.hypot(second.re, second.im)] as const;
  return {
    hour,
    levelAmps: Math.hypot(differential.re, differential.im),
    throughAmps: restraint === 'the greatest' ? Math.max(...ends) : (ends[0] + ends[1]) / 2,
  };
}

/** Day rows of the hours, from hour 0 on. */
export function daySumsOf(
  hours: Iterable<MeasuredHour>,
  { hasVoltage }: { readonly hasVoltage: boolean } = { hasVoltage: true },
): CompositionSums[] {
  const days: CompositionSums[] = [];
  for (const { hour, differential, voltageKv, second, throughAmps } of hours) {
    const day = Math.floor(hour / 24);
    const sums = (days[day] ??= emptySums({ terminalCount: 2, hasVoltage }));
    addSnapshot(sums, {
      differentialAmps: differential,
      voltageKv,
      otherCurrentsAmps: [second],
      throughAmps,
    });
  }
  return days;
}
