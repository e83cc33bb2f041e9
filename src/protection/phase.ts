/** The three phases of a line, in their order of rotation. A site may show them under other letters. */
export const PHASES = ['a', 'b', 'c'] as const;

export type PhaseName = (typeof PHASES)[number];

/** One value for each phase. */
export type PerPhase<T> = Readonly<Record<PhaseName, T>>;

/** The values that `f` yields for the three phases. */
export function perPhase<T>(f: (phase: PhaseName) => T): PerPhase<T> {
  return { a: f('a'), b: f('b'), c: f('c') };
}
