import { z } from 'zod';

/** What became of the charging current: not compensated by the scheme, taken out, or left in because it could not be told. */
export const COMPENSATIONS = ['none', 'applied', 'fallen back'] as const;
export const compensationSchema = z.enum(COMPENSATIONS);
export type CompensationOnWire = z.infer<typeof compensationSchema>;
