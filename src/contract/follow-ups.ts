import { z } from 'zod';
import { keySchema } from './key';
import { followUpSchema } from './standing';

/** The query and the answer of GET /api/follow-ups. */
export const followUpQuerySchema = z.object({
  line: keySchema.optional(),
  state: z.enum(['open', 'done']).optional(),
});
export type FollowUpQuery = z.infer<typeof followUpQuerySchema>;
export const followUpListSchema = z.object({ followUps: z.array(followUpSchema) });
