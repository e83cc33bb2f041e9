import { z } from 'zod';
import { keySchema } from './key';

/** Where the feed's limits are decided, once. */
export const FEED_LIMITS = {
  payloadBytes: 8 * 1024,
  keptPayloadBytes: 2 * 1024,
  aheadMs: 5_000,
  magnitudeOverRating: 100,
} as const;

export type FeedTopic = { line: string; terminal: string; subject: 'measurement' | 'presence' };

export const measurementTopic = (line: string, terminal: string): string =>
  `feed/${line}/${terminal}/measurement`;
export const presenceTopic = (line: string, terminal: string): string => `feed/${line}/${terminal}/presence`;

/** The parts of a feed topic, or undefined when the topic is not one of the contract's. */
export function parseFeedTopic(topic: string): FeedTopic | undefined {
  const [root, line, terminal, subject, ...rest] = topic.split('/');
  if (root !== 'feed' || rest.length > 0) return undefined;
  if (subject !== 'measurement' && subject !== 'presence') return undefined;
  if (!keySchema.safeParse(line).success || !keySchema.safeParse(terminal).success) return undefined;
  return { line: line!, terminal: terminal!, subject };
}

const magnitude = z.number().nonnegative();
const polar = z.tuple([magnitude, z.number()]);
const polarPerPhase = z.object({ a: polar, b: polar, c: polar });
const magnitudePerPhase = z.tuple([magnitude, magnitude, magnitude]);

export const presenceSchema = z.enum(['online', 'offline']);
export const breakerSchema = z.enum(['closed', 'open']);
export const validitySchema = z.enum(['good', 'questionable', 'invalid']);
export const clockSchema = z.object({
  source: z.enum(['satellite', 'channel', 'free']),
  error_us: z.number().nonnegative(),
});
export const channelSchema = z.object({
  send_ms: z.number().nonnegative(),
  receive_ms: z.number().nonnegative(),
  loss_ppm: z.number().nonnegative(),
  path: z.string().max(40),
});

/** What a terminal publishes at one snapshot instant: amperes rms primary into the line, kilovolts rms phase to earth, degrees. */
export const measurementSchema = z
  .object({
    at: z.iso.datetime(),
    seq: z.int().nonnegative(),
    current: polarPerPhase.optional(),
    voltage: polarPerPhase.optional(),
    frequency: z.number().positive(),
    breaker: breakerSchema,
    clock: clockSchema,
    channel: channelSchema.optional(),
    reported: z.object({ differential: magnitudePerPhase, restraint: magnitudePerPhase }).optional(),
    validity: validitySchema,
    test: z.boolean(),
  })
  .refine((m) => m.current !== undefined || m.reported !== undefined, {
    message: 'A measurement carries current, or reported, or both.',
    path: ['current'],
  });
export type Measurement = z.infer<typeof measurementSchema>;
export type PolarPerPhase = z.infer<typeof polarPerPhase>;

export const REFUSAL_REASONS = [
  'not JSON',
  'over 8 KB',
  'field missing or of the wrong type',
  'number not finite',
  'negative magnitude',
  'magnitude over 100 times the rating',
  'unknown topic',
  'unknown line',
  'unknown terminal',
  'instant ahead of time',
  'instant older than the raw store',
] as const;
export type RefusalReason = (typeof REFUSAL_REASONS)[number];
export const refusalReasonSchema = z.enum(REFUSAL_REASONS);

export type Refusal = { reason: RefusalReason; detail: string };
export type ParsedMeasurement =
  { ok: true; measurement: Measurement; atMs: number } | { ok: false; refusal: Refusal };

/** Parses a payload by the contract alone; what needs the register or the clock (rating, keys, instants) is judged by the caller. */
export function parseMeasurement(payload: Buffer): ParsedMeasurement {
  if (payload.length > FEED_LIMITS.payloadBytes)
    return refused('over 8 KB', `The payload has ${payload.length} bytes; 8192 are allowed.`);
  let value: unknown;
  try {
    value = JSON.parse(payload.toString('utf8'));
  } catch (error) {
    return refused('not JSON', (error as Error).message);
  }
  const parsed = measurementSchema.safeParse(value);
  if (!parsed.success) return { ok: false, refusal: refusalOf(parsed.error.issues, value) };
  return { ok: true, measurement: parsed.data, atMs: Date.parse(parsed.data.at) };
}

function refused(reason: RefusalReason, detail: string): ParsedMeasurement {
  return { ok: false, refusal: { reason, detail } };
}

function refusalOf(issues: readonly z.core.$ZodIssue[], value: unknown): Refusal {
  const detail = issues.map((issue) => `${issue.path.join('.') || 'payload'}: ${issue.message}`).join('; ');
  const first = issues[0];
  if (first === undefined) return { reason: 'field missing or of the wrong type', detail };
  const found = first.path.reduce<unknown>((at, key) => (at as Record<PropertyKey, unknown>)?.[key], value);
  if (typeof found === 'number' && !Number.isFinite(found)) return { reason: 'number not finite', detail };
  const isMagnitude = !['seq', 'frequency'].includes(String(first.path[0]));
  if (isMagnitude && first.code === 'too_small' && typeof found === 'number' && found < 0)
    return { reason: 'negative magnitude', detail };
  return { reason: 'field missing or of the wrong type', detail };
}
