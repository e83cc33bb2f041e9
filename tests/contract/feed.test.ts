import { describe, expect, it } from 'vitest';
import {
  FEED_LIMITS,
  measurementTopic,
  parseFeedTopic,
  parseMeasurement,
  presenceTopic,
} from '../../src/contract/feed';
import { seededRandom } from '../protection/seeded-random';

/** The example of the contract, with every optional part. */
const sent = {
  at: '2026-03-01T10:00:02.000Z',
  seq: 48211,
  current: { a: [412.3, -12.7], b: [410.9, -132.4], c: [411.8, 107.5] },
  voltage: { a: [231.2, 0.0], b: [231.0, -120.1], c: [231.4, 119.9] },
  frequency: 49.98,
  breaker: 'closed',
  clock: { source: 'satellite', error_us: 2 },
  channel: { send_ms: 4.1, receive_ms: 4.1, loss_ppm: 3, path: 'main' },
  reported: { differential: [9.1, 8.8, 9.4], restraint: [411.0, 410.2, 411.5] },
  validity: 'good',
  test: false,
};
type Sent = Record<string, unknown>;

const parsed = (value: unknown) => parseMeasurement(Buffer.from(JSON.stringify(value)));
const without = (...fields: string[]): Sent =>
  Object.fromEntries(Object.entries(sent).filter(([field]) => !fields.includes(field)));
const reasonOf = (payload: Buffer): string | undefined => {
  const outcome = parseMeasurement(payload);
  return outcome.ok ? undefined : outcome.refusal.reason;
};

describe('a measurement', () => {
  it('of the contract parses to what was sent', () => {
    expect(parsed(sent)).toEqual({
      ok: true,
      measurement: sent,
      atMs: Date.parse('2026-03-01T10:00:02.000Z'),
    });
  });

  it.each([
    ['current', without('reported', 'voltage', 'channel')],
    ['reported magnitudes', without('current', 'voltage', 'channel')],
  ])('that carries %s alone parses', (_, value) => {
    expect(parsed(value)).toMatchObject({ ok: true });
  });

  it('keeps its known fields and ignores the unknown ones', () => {
    const outcome = parsed({
      ...sent,
      firmware: '4.2',
      clock: { ...sent.clock, holdover: true },
      current: { ...sent.current, n: [3.1, 12] },
    });
    expect(outcome).toMatchObject({ ok: true, measurement: sent });
    expect(JSON.stringify(outcome)).not.toMatch(/firmware|holdover|"n"/);
  });

  it('of exactly 8 KB parses, and of one byte more does not', () => {
    const padded = (bytes: number) => Buffer.from(JSON.stringify(sent).padEnd(bytes));
    expect(FEED_LIMITS.payloadBytes).toBe(8192);
    expect(reasonOf(padded(8192))).toBeUndefined();
    expect(reasonOf(padded(8193))).toBe('over 8 KB');
  });
});

describe('a payload that is refused as not JSON', () => {
  it.each([
    ['an empty one', ''],
    ['words', 'differential 9.1'],
    ['a cut object', JSON.stringify(sent).slice(0, 200)],
    ['a number that JSON does not know', '{"seq": NaN}'],
    ['bytes that are no text', Buffer.from([0xff, 0xfe, 0x00, 0x9c])],
    ['a thousand open brackets', '['.repeat(1000)],
  ])('is %s', (_, payload) => {
    expect(reasonOf(Buffer.from(payload))).toBe('not JSON');
  });
});

describe('a measurement with a field missing or of the wrong type', () => {
  const broken: [string, Sent | unknown, string][] = [
    ['no instant', without('at'), 'at'],
    ['an instant in local time', { ...sent, at: '2026-03-01T10:00:02.000+01:00' }, 'at'],
    ['an instant without zone', { ...sent, at: '2026-03-01T10:00:02.000' }, 'at'],
    ['a day that no calendar has', { ...sent, at: '2026-02-30T10:00:02.000Z' }, 'at'],
    ['an instant in milliseconds', { ...sent, at: 1772359202000 }, 'at'],
    ['no sequence count', without('seq'), 'seq'],
    ['half a sequence count', { ...sent, seq: 1.5 }, 'seq'],
    ['a sequence count in words', { ...sent, seq: '48211' }, 'seq'],
    ['no frequency', without('frequency'), 'frequency'],
    ['a frequency of nothing', { ...sent, frequency: 0 }, 'frequency'],
    ['no breaker', without('breaker'), 'breaker'],
    ['an unknown breaker position', { ...sent, breaker: 'tripped' }, 'breaker'],
    ['no clock', without('clock'), 'clock'],
    ['an unknown clock', { ...sent, clock: { source: 'gut feeling', error_us: 2 } }, 'clock.source'],
    ['a clock without its error', { ...sent, clock: { source: 'satellite' } }, 'clock.error_us'],
    ['no validity', without('validity'), 'validity'],
    ['an unknown validity', { ...sent, validity: 'reserved' }, 'validity'],
    ['no test flag', without('test'), 'test'],
    ['a test flag in words', { ...sent, test: 'false' }, 'test'],
    ['a phase missing', { ...sent, current: { a: sent.current.a, b: sent.current.b } }, 'current.c'],
    ['a phase without angle', { ...sent, current: { ...sent.current, a: [412.3] } }, 'current.a'],
    ['a phase of three numbers', { ...sent, current: { ...sent.current, a: [1, 2, 3] } }, 'current.a'],
    ['a current that is null', { ...sent, current: null }, 'current'],
    ['a magnitude that is null', { ...sent, current: { ...sent.current, a: [null, 0] } }, 'current.a.0'],
    [
      'two reported phases',
      { ...sent, reported: { ...sent.reported, restraint: [1, 2] } },
      'reported.restraint',
    ],
    [
      'a channel without path',
      { ...sent, channel: { send_ms: 4, receive_ms: 4, loss_ppm: 0 } },
      'channel.path',
    ],
    [
      'a path of 41 characters',
      { ...sent, channel: { ...sent.channel, path: 'x'.repeat(41) } },
      'channel.path',
    ],
    ['neither current nor reported', without('current', 'reported'), 'current'],
    ['a list', [sent], 'payload'],
    ['null', null, 'payload'],
    ['a bare number', 42, 'payload'],
  ];

  it.each(broken)('is refused for %s, and the detail names the field', (_, value, field) => {
    const outcome = parsed(value);
    expect(outcome).toMatchObject({
      ok: false,
      refusal: { reason: 'field missing or of the wrong type' },
    });
    expect(!outcome.ok && outcome.refusal.detail).toContain(`${field}: `);
  });

  it('has all its faults told at once', () => {
    const outcome = parsed(without('at', 'seq', 'validity'));
    expect(!outcome.ok && outcome.refusal.detail).toMatch(/^at: .*; seq: .*; validity: /);
  });
});

describe('a number', () => {
  const text = JSON.stringify(sent);
  it.each([
    ['current', '412.3'],
    ['angle', '-12.7'],
    ['voltage', '231.2'],
    ['frequency', '49.98'],
    ['reported differential', '9.1'],
    ['sequence count', '48211'],
  ])('too large to be finite is refused as such (%s)', (_, figure) => {
    expect(reasonOf(Buffer.from(text.replace(figure, '1e999')))).toBe('number not finite');
  });

  it.each([
    ['current', { ...sent, current: { ...sent.current, b: [-0.1, 0] } }],
    ['voltage', { ...sent, voltage: { ...sent.voltage, a: [-231, 0] } }],
    ['reported differential', { ...sent, reported: { ...sent.reported, differential: [9, -8, 9] } }],
    ['reported restraint', { ...sent, reported: { ...sent.reported, restraint: [411, 410, -1] } }],
    ['channel delay', { ...sent, channel: { ...sent.channel, send_ms: -4 } }],
    ['clock error', { ...sent, clock: { ...sent.clock, error_us: -2 } }],
  ])('below zero is refused as a negative magnitude (%s)', (_, value) => {
    expect(parsed(value)).toMatchObject({ ok: false, refusal: { reason: 'negative magnitude' } });
  });

  it('of zero is a magnitude', () => {
    expect(parsed({ ...sent, current: { a: [0, 0], b: [0, 0], c: [0, 0] } })).toMatchObject({ ok: true });
  });
});

describe('any valid measurement', () => {
  it('parses to what was sent, whatever its figures and optional parts', () => {
    const random = seededRandom(61869);
    for (let round = 0; round < 500; round += 1) {
      const value = madeUp(random);
      const outcome = parsed(value);
      expect(outcome.ok && outcome.measurement).toEqual(value);
    }
  });
});

describe('a topic', () => {
  it.each([
    [
      measurementTopic('arden-birk', 'arden'),
      { line: 'arden-birk', terminal: 'arden', subject: 'measurement' },
    ],
    [presenceTopic('l-1', '2'), { line: 'l-1', terminal: '2', subject: 'presence' }],
    [`feed/${'x'.repeat(40)}/b/presence`, { line: 'x'.repeat(40), terminal: 'b', subject: 'presence' }],
  ])('of the contract has its parts read: %s', (topic, parts) => {
    expect(parseFeedTopic(topic)).toEqual(parts);
  });

  it.each([
    '',
    'feed',
    'feed/a/b',
    'feed/a/b/measurement/more',
    'feed/a/b/command',
    'feed/A/b/measurement',
    'feed/a b/b/measurement',
    'feed//b/measurement',
    'feed/a//measurement',
    '/feed/a/b/measurement',
    'other/a/b/measurement',
    `feed/${'x'.repeat(41)}/b/measurement`,
    'feed/ä/b/measurement',
    'feed/+/+/measurement',
  ])('that is not of the contract has none: %j', (topic) => {
    expect(parseFeedTopic(topic)).toBeUndefined();
  });
});

function madeUp(random: () => number): Sent {
  const number = (most: number) => most * random();
  const one = <T>(...of: T[]): T => of[Math.floor(random() * of.length)]!;
  const polar = () => [number(40_000), 720 * random() - 360];
  const phases = () => ({ a: polar(), b: polar(), c: polar() });
  const three = () => [number(9_000), number(9_000), number(9_000)];
  const reported = { differential: three(), restraint: three() };
  const carries = one('current', 'reported', 'both');
  return {
    at: new Date(Math.floor(number(2e12))).toISOString(),
    seq: Math.floor(number(2 ** 40)),
    ...(carries !== 'reported' && { current: phases() }),
    ...(carries !== 'current' && { reported }),
    ...(random() < 0.5 && { voltage: phases() }),
    frequency: 45 + number(20),
    breaker: one('closed', 'open'),
    clock: { source: one('satellite', 'channel', 'free'), error_us: number(1e5) },
    ...(random() < 0.5 && {
      channel: {
        send_ms: number(50),
        receive_ms: number(50),
        loss_ppm: number(1e6),
        path: one('main', '', 'z'.repeat(40)),
      },
    }),
    validity: one('good', 'questionable', 'invalid'),
    test: one(true, false),
  };
}
