import type { DailyLevel } from '../../src/standing/creep';
import { seededRandom } from '../protection/seeded-random';

/** A day in January 2026. */
export const FIRST_DAY = 20_465;

/**
 * Daily levels from 40 A on that drift by `slopeAmpsPerDay`, with independent noise of up to ±`noiseAmps`;
 * the same every time for the same seed.
 */
export function seededLevels(
  days: number,
  { slopeAmpsPerDay, noiseAmps, seed }: { slopeAmpsPerDay: number; noiseAmps: number; seed: number },
): DailyLevel[] {
  const random = seededRandom(seed);
  return Array.from({ length: days }, (_, index) => ({
    day: FIRST_DAY + index,
    levelAmps: 40 + slopeAmpsPerDay * index + noiseAmps * (2 * random() - 1),
  }));
}
