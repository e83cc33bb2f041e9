import { z } from 'zod';
import { keySchema } from './key';

const WHAT_MOST = 500;

/** POST /api/works: work done on a line that may have moved its standing level. */
export const newWorkSchema = z.object({
  line: keySchema,
  /** where it was done; null for the line itself or more than one terminal */
  terminal: keySchema.nullable().default(null),
  /** the day in UTC, as day rows have it */
  doneOn: z.iso.date('Give the day on which the work was done.'),
  what: z
    .string()
    .trim()
    .min(1, 'Say what was done.')
    .max(WHAT_MOST, `What was done has at most ${WHAT_MOST} characters.`),
  /** the follow-up that it ended, if one did */
  followUp: z.int().positive().nullable().default(null),
});
export type NewWork = z.output<typeof newWorkSchema>;

/** POST /api/follow-ups/<id>/done: with what was done, where it may have moved the standing level. */
export const followUpDoneSchema = z.object({
  work: newWorkSchema.omit({ line: true, followUp: true }).nullable().default(null),
});
export type FollowUpDone = z.output<typeof followUpDoneSchema>;

export const workSchema = z.object({
  id: z.int(),
  line: keySchema,
  lineName: z.string(),
  terminal: keySchema.nullable(),
  doneOn: z.iso.date(),
  what: z.string(),
  followUp: z.int().nullable(),
  recordedBy: z.string(),
  recordedAt: z.iso.datetime(),
  /** a record made in error is withdrawn, not deleted */
  withdrawn: z.object({ by: z.string(), at: z.iso.datetime() }).nullable(),
});
export type Work = z.infer<typeof workSchema>;

/** The query and the answer of GET /api/works. */
export const worksQuerySchema = z.object({ line: keySchema.optional() });
export const workListSchema = z.object({ works: z.array(workSchema) });
