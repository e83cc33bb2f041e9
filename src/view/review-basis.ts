/** Where a prediction takes the mismatches of the terminals from: each stands in where those before it can't tell. */
export const MISMATCH_BASES = ['composition', 'snapshot', 'class limits'] as const;
export type MismatchBasis = (typeof MISMATCH_BASES)[number];

const IN_ADDRESS = {
  composition: undefined,
  snapshot: 'snapshot',
  'class limits': 'class',
} as const satisfies Record<MismatchBasis, string | undefined>;

/** What the address says of a basis; undefined for the first choice, which leaves the address as it is. */
export const basisInAddress = (basis: MismatchBasis): string | undefined => IN_ADDRESS[basis];

/** The basis that an address asks for; the first choice where it holds none or nonsense. */
export const basisFromAddress = (value: string | null): MismatchBasis =>
  MISMATCH_BASES.find((basis) => IN_ADDRESS[basis] === (value ?? undefined)) ?? 'composition';
