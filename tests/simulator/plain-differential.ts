import type { Measurement } from '../../src/contract/feed';
import type { DemoMeasurement, DemoMeasurements } from '../../simulator/demo-history';

/** Schoolbook arithmetic on what terminals publish; nothing of the product's, nothing of the plant's. */
export type Phase = 'a' | 'b' | 'c';

export function differentialAmps(measurements: readonly DemoMeasurement[], phase: Phase): number {
  let east = 0;
  let north = 0;
  for (const { measurement } of measurements) {
    const [amps, degrees] = measurement.current![phase];
    east += amps * Math.cos((degrees * Math.PI) / 180);
    north += amps * Math.sin((degrees * Math.PI) / 180);
  }
  return Math.hypot(east, north);
}

export const halfSumAmps = (measurements: readonly DemoMeasurement[], phase: Phase): number =>
  measurements.reduce((sum, { measurement }) => sum + measurement.current![phase][0], 0) / 2;

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((one, other) => one - other);
  return sorted[Math.floor(sorted.length / 2)]!;
}

export const DAY_MS = 86_400_000;

/** Median differential of a phase over the 24 hours that end at an instant. */
export function dayLevelAmps(
  feed: DemoMeasurements,
  where: { readonly line: string; readonly phase: Phase },
  endMs: number,
): number {
  const levels: number[] = [];
  for (let atMs = endMs - DAY_MS; atMs < endMs; atMs += 600_000)
    levels.push(differentialAmps(feed(where.line, atMs), where.phase));
  return median(levels);
}

export const only = (measurements: readonly DemoMeasurement[], terminal: string): Measurement =>
  measurements.find((each) => each.terminal === terminal)!.measurement;
