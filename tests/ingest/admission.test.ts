import { describe, expect, it } from 'vitest';
import type { Measurement } from '../../src/contract/feed';
import { admission } from '../../src/ingest/admission';
import { roster } from '../../src/ingest/roster';
import type { RegisteredLine } from '../../src/store/register';
import {
  AT_MS,
  balanced,
  iso,
  measurement,
  payloadOf,
  registeredLine,
  reportedMeasurement,
} from './made-up-feed';

const DAY_MS = 86_400_000;
const RAW_REACH_MS = 14 * DAY_MS;

function admitted(sent: unknown, { topic, line }: { topic?: string; line?: Partial<RegisteredLine> } = {}) {
  return admission(
    { topic: topic ?? 'feed/arden-birk/arden/measurement', payload: payloadOf(sent) },
    {
      roster: roster([registeredLine(line)], { workerIndex: 0, workerCount: 1, frequencyHz: 50 }),
      nowMs: AT_MS,
      rawReachMs: RAW_REACH_MS,
    },
  );
}
const reasonOf = (outcome: ReturnType<typeof admitted>) => !outcome.ok && outcome.refusal.reason;
const at = (atMs: number): Measurement => measurement({ at: iso(atMs) });

describe('a message of a known terminal', () => {
  it('is admitted with its line, its terminal and its instant', () => {
    const outcome = admitted(measurement());
    expect(outcome).toMatchObject({
      ok: true,
      admitted: {
        line: { key: 'arden-birk', id: 7 },
        terminal: { key: 'arden', id: 11 },
        atMs: AT_MS,
        measurement: measurement(),
      },
    });
  });

  it('is refused for what the contract alone decides', () => {
    expect(reasonOf(admitted({ ...measurement(), validity: undefined }))).toBe(
      'field missing or of the wrong type',
    );
  });
});

describe('a topic', () => {
  it.each([
    ['an unknown line', 'feed/corl-dorn/arden/measurement', 'unknown line'],
    ['an unknown terminal of a known line', 'feed/arden-birk/corl/measurement', 'unknown terminal'],
    ['a terminal of the line in capitals', 'feed/arden-birk/ARDEN/measurement', 'unknown topic'],
    ['another subject', 'feed/arden-birk/arden/command', 'unknown topic'],
    ['one level more', 'feed/arden-birk/arden/measurement/2', 'unknown topic'],
    ['presence, which is no measurement', 'feed/arden-birk/arden/presence', 'unknown topic'],
  ])('of %s is refused as such, before the payload is read', (_, topic, reason) => {
    expect(reasonOf(admitted('not even an object', { topic }))).toBe(reason);
  });
});

describe('an instant', () => {
  it.each([
    ['5 s ahead', 5_000, false],
    ['5.001 s ahead', 5_001, 'instant ahead of time'],
    ['of now', 0, false],
    ['as old as the raw store reaches', -RAW_REACH_MS, false],
    ['1 ms older than the raw store reaches', -RAW_REACH_MS - 1, 'instant older than the raw store'],
  ])('%s: %#', (_, offsetMs, reason) => {
    expect(reasonOf(admitted(at(AT_MS + offsetMs)))).toBe(reason);
  });

  it('that is refused is told in seconds or days beside what is allowed', () => {
    const ahead = admitted(at(AT_MS + 7_250));
    const old = admitted(at(AT_MS - 20 * DAY_MS));
    expect(!ahead.ok && ahead.refusal.detail).toBe('The instant is 7.3 s ahead; 5 s are allowed.');
    expect(!old.ok && old.refusal.detail).toBe(
      'The instant is 20.0 days old; the raw store reaches back 14 days.',
    );
  });
});

describe('a magnitude', () => {
  const reported = (differential: number, restraint: number) =>
    reportedMeasurement({ reported: { differential: [1, differential, 1], restraint: [1, restraint, 1] } });

  it.each([
    ['current of 100 times the rating', measurement({ current: balanced(100_000, 0) }), false],
    ['current above it', measurement({ current: balanced(100_000.1, 0) }), true],
    ['reported differential above it', reported(100_000.1, 400), true],
    ['reported restraint above it', reported(9, 100_000.1), true],
  ])('of %s is judged by the line it belongs to', (_, sent, refused) => {
    const goesBy = sent.current === undefined ? 'reported' : 'phasors';
    expect(reasonOf(admitted(sent, { line: { goesBy } }))).toBe(
      refused && 'magnitude over 100 times the rating',
    );
  });
});

describe('a measurement that lacks what its line goes by', () => {
  it.each([
    ['phasors', reportedMeasurement(), /^current: .* goes by phasors; .* only reported\.$/],
    ['reported', measurement(), /^reported: .* goes by reported; .* only current\.$/],
  ] as const)('is refused on a line that goes by %s, and says so', (goesBy, sent, words) => {
    const outcome = admitted(sent, { line: { goesBy } });
    expect(reasonOf(outcome)).toBe('field missing or of the wrong type');
    expect(!outcome.ok && outcome.refusal.detail).toMatch(words);
  });

  it.each(['phasors', 'reported'] as const)('is admitted with both on a line that goes by %s', (goesBy) => {
    const both = measurement({ reported: { differential: [9, 9, 9], restraint: [400, 400, 400] } });
    expect(admitted(both, { line: { goesBy } }).ok).toBe(true);
  });
});
