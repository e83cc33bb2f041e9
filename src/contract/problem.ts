import { z } from 'zod';

/** Every refusal of an endpoint: a sentence, and where it concerns fields, each with its own. */
export const problemSchema = z.object({
  problem: z.string(),
  fields: z.array(z.object({ field: z.string(), problem: z.string() })).default([]),
});
export type Problem = z.infer<typeof problemSchema>;
