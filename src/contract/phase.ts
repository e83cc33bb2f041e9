import { z } from 'zod';

export const phaseNameSchema = z.enum(['a', 'b', 'c']);

/** The same shape for each of the three phases. */
export const perPhaseSchema = <T extends z.ZodType>(shape: T) => z.object({ a: shape, b: shape, c: shape });
