import { z } from 'zod';
import { presenceSchema, refusalReasonSchema } from './feed';
import { keySchema } from './key';

export const feedTerminalSchema = z.object({
  line: keySchema,
  lineName: z.string(),
  terminal: keySchema,
  substationName: z.string(),
  /** false when nothing is to come from it: it or its line is out of service, or the line goes by another terminal's report */
  expected: z.boolean(),
  presence: presenceSchema.nullable(),
  /** instant of the newest measurement */
  lastAt: z.iso.datetime().nullable(),
  /** when it was received */
  heardAt: z.iso.datetime().nullable(),
  lastSeq: z.int().nullable(),
  gapCount: z.int(),
  /** measurements that the gaps skipped */
  missedCount: z.int(),
});
export type FeedTerminal = z.infer<typeof feedTerminalSchema>;

/** GET /api/feed */
export const feedHealthSchema = z.object({
  at: z.iso.datetime(),
  terminals: z.array(feedTerminalSchema),
  refusals: z.array(z.object({ reason: refusalReasonSchema, count: z.int(), lastAt: z.iso.datetime() })),
});
export type FeedHealth = z.infer<typeof feedHealthSchema>;

/** GET /api/feed/refusals */
export const keptRefusalSchema = z.object({
  id: z.int(),
  at: z.iso.datetime(),
  topic: z.string(),
  reason: refusalReasonSchema,
  detail: z.string(),
  payload: z.string(),
  /** true when the message was longer than what is kept of it */
  cut: z.boolean(),
});
export const refusalListSchema = z.object({ refusals: z.array(keptRefusalSchema) });
export type KeptRefusal = z.infer<typeof keptRefusalSchema>;
