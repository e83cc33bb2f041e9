export const PHASES = ['a', 'b', 'c'] as const;
export type PhaseName = (typeof PHASES)[number];
