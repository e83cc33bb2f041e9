import {
  FEED_LIMITS,
  type Measurement,
  parseFeedTopic,
  parseMeasurement,
  type Refusal,
} from '../contract/feed';
import type { Roster, RosterLine, RosterTerminal } from './roster';

export type Admitted = { line: RosterLine; terminal: RosterTerminal; measurement: Measurement; atMs: number };
export type Admission = { ok: true; admitted: Admitted } | { ok: false; refusal: Refusal };

/** Judges one measurement message by the contract, the register and the clock. */
export function admission(
  message: { topic: string; payload: Buffer },
  context: { roster: Roster; nowMs: number; rawReachMs: number },
): Admission {
  const topic = parseFeedTopic(message.topic);
  if (topic === undefined || topic.subject !== 'measurement')
    return refuse('unknown topic', 'The topic is not feed/<line>/<terminal>/measurement with valid keys.');
  const line = context.roster.get(topic.line);
  if (line === undefined) return refuse('unknown line', `The register holds no line “${topic.line}”.`);
  const terminal = line.terminals.get(topic.terminal);
  if (terminal === undefined)
    return refuse('unknown terminal', `The line “${topic.line}” has no terminal “${topic.terminal}”.`);
  const parsed = parseMeasurement(message.payload);
  if (!parsed.ok) return parsed;
  const { measurement, atMs } = parsed;
  const refusal =
    instantRefusal(atMs, context) ?? magnitudeRefusal(measurement, line) ?? contentRefusal(measurement, line);
  return refusal === undefined
    ? { ok: true, admitted: { line, terminal, measurement, atMs } }
    : { ok: false, refusal };
}

const refuse = (reason: Refusal['reason'], detail: string): Admission => ({
  ok: false,
  refusal: { reason, detail },
});

function instantRefusal(
  atMs: number,
  { nowMs, rawReachMs }: { nowMs: number; rawReachMs: number },
): Refusal | undefined {
  if (atMs > nowMs + FEED_LIMITS.aheadMs)
    return {
      reason: 'instant ahead of time',
      detail: `The instant is ${((atMs - nowMs) / 1000).toFixed(1)} s ahead; 5 s are allowed.`,
    };
  if (atMs < nowMs - rawReachMs)
    return {
      reason: 'instant older than the raw store',
      detail: `The instant is ${((nowMs - atMs) / 86_400_000).toFixed(1)} days old; the raw store reaches back ${rawReachMs / 86_400_000} days.`,
    };
  return undefined;
}

function magnitudeRefusal(measurement: Measurement, line: RosterLine): Refusal | undefined {
  const most = FEED_LIMITS.magnitudeOverRating * line.ratingAmps;
  const { current, reported } = measurement;
  const greatest = Math.max(
    ...(current === undefined ? [] : [current.a[0], current.b[0], current.c[0]]),
    ...(reported === undefined ? [] : [...reported.differential, ...reported.restraint]),
  );
  if (greatest <= most) return undefined;
  return {
    reason: 'magnitude over 100 times the rating',
    detail: `A current of ${greatest} A stands against a rating of ${line.ratingAmps} A.`,
  };
}

/** A measurement that lacks what its line goes by can never complete a snapshot. */
function contentRefusal(measurement: Measurement, line: RosterLine): Refusal | undefined {
  const missing =
    line.goesBy === 'phasors' ? measurement.current === undefined : measurement.reported === undefined;
  if (!missing) return undefined;
  const [has, needs] = line.goesBy === 'phasors' ? ['reported', 'current'] : ['current', 'reported'];
  return {
    reason: 'field missing or of the wrong type',
    detail: `${needs}: the register says that this line goes by ${line.goesBy}; the message carries only ${has}.`,
  };
}
