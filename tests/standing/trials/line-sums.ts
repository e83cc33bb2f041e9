import { addSnapshot, emptySums } from '../../../src/standing/composition-sums';
import type { CompositionSums } from '../../../src/standing/composition-sums';
import type { MeasuredHour } from './seeded-line';

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

/** Day rows of the hours, from hour 0 on. */
export function daySumsOf(hours: Iterable<MeasuredHour>): CompositionSums[] {
  const days: CompositionSums[] = [];
  for (const { hour, differential, voltageKv, second, throughAmps } of hours) {
    const day = Math.floor(hour / 24);
    const sums = (days[day] ??= emptySums({ terminalCount: 2, hasVoltage: true }));
    addSnapshot(sums, {
      differentialAmps: differential,
      voltageKv,
      otherCurrentsAmps: [second],
      throughAmps,
    });
  }
  return days;
}
