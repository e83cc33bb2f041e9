import type { LoadProfile } from '../plant/load';

type Shape = Omit<LoadProfile, 'meanShare' | 'from'>;

const shaped =
  (shape: Shape) =>
  (meanShare: number, from: LoadProfile['from'] = 'first'): LoadProfile => ({ ...shape, meanShare, from });

/** towns: up in the evening, down at the weekend */
export const towns = shaped({ dailySwing: 0.24, weekendDip: 0.14, wander: 0.1, tanPhi: 0.25 });
/** works that run in shifts: flatter, and quieter at the weekend */
export const works = shaped({ dailySwing: 0.12, weekendDip: 0.06, wander: 0.06, tanPhi: 0.35 });
/** the way out of a power station: flat */
export const generation = shaped({ dailySwing: 0.02, weekendDip: 0.015, wander: 0.025, tanPhi: 0.08 });
/** between the large substations: goes with trade as much as with the hour */
export const transit = shaped({ dailySwing: 0.16, weekendDip: 0.1, wander: 0.2, tanPhi: 0.12 });
