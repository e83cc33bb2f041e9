import { z } from 'zod';
import { resultSchema } from './result';
import { warningSchema } from './warning';

export const LIVE_PATH = '/live';
export const LIVE_LIMITS = {
  tickMs: 250,
  heartbeatMs: 10_000,
  sessionCheckMs: 5_000,
  /** a client with more than this waiting in its socket is left out until it has drained */
  waitingBytes: 256 * 1024,
} as const;

export const liveFrameSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('tick'),
    at: z.iso.datetime(),
    results: z.array(resultSchema),
    warnings: z.array(warningSchema),
  }),
  z.object({ kind: z.literal('heartbeat'), at: z.iso.datetime() }),
]);
export type LiveFrame = z.infer<typeof liveFrameSchema>;
