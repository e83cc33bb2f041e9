import { z } from 'zod';
import { keySchema } from './key';
import { followUpSchema } from './standing';
import { workSchema } from './works';

export const FOLLOW_UPS_MOST = 500;
/** How many of those done last a page shows. */
export const DONE_MOST = 20;

/** The query and the answer of GET /api/follow-ups. */
export const followUpQuerySchema = z.object({
  line: keySchema.optional(),
  state: z.enum(['open', 'done']).optional(),
  limit: z.coerce.number().int().min(1).max(FOLLOW_UPS_MOST).optional(),
});
export type FollowUpQuery = z.infer<typeof followUpQuerySchema>;

/** A follow-up with what it takes to say what was done, and what has been. */
export const followUpInFullSchema = followUpSchema.extend({
  /** of its line, with the names of their substations */
  terminals: z.array(z.object({ key: keySchema, name: z.string() })),
  /** recorded with it, newest first, withdrawn ones too */
  works: z.array(workSchema),
});
export type FollowUpInFull = z.infer<typeof followUpInFullSchema>;
export const followUpListSchema = z.object({ followUps: z.array(followUpInFullSchema) });
