import { describe, expect, it } from 'vitest';
import type { Measurement } from '../../src/contract/feed';
import { packMeasurements, type PackedTerminal, unpackMeasurements } from '../../src/store/packing';
import { seededRandom } from '../protection/seeded-random';

const AT = new Date('2026-03-02T10:00:00.000Z');
const random = seededRandom(1);
/** Any double of ordinary size, with all its digits. */
const number = (): number => (random() - 0.3) * 10 ** Math.floor(12 * random() - 4);
const one = <T>(...of: T[]): T => of[Math.floor(random() * of.length)]!;
const phases = (): NonNullable<Measurement['current']> => ({
  a: [number(), number()],
  b: [number(), number()],
  c: [number(), number()],
});

type Part = 'current' | 'voltage' | 'reported' | 'channel';
const PARTS: readonly Part[] = ['current', 'voltage', 'reported', 'channel'];
/** Every set of the optional parts. */
const COMBINATIONS = Array.from({ length: 16 }, (_, bits) =>
  PARTS.filter((_part, index) => (bits & (1 << index)) !== 0),
);

function madeUp(parts: readonly Part[]): Measurement {
  const optional: Pick<Measurement, Part> = {
    current: phases(),
    voltage: phases(),
    reported: {
      differential: [number(), number(), number()],
      restraint: [number(), number(), number()],
    },
    channel: {
      send_ms: number(),
      receive_ms: number(),
      loss_ppm: number(),
      path: one('', 'main', 'Weg über Ärmel'),
    },
  };
  return {
    at: AT.toISOString(),
    seq: Math.floor(random() * Number.MAX_SAFE_INTEGER),
    frequency: number(),
    breaker: one('closed', 'open'),
    clock: { source: one('satellite', 'channel', 'free'), error_us: number() },
    validity: one('good', 'questionable', 'invalid'),
    test: one(true, false),
    ...Object.fromEntries(parts.map((part) => [part, optional[part]])),
  };
}

const roundTrip = (terminals: readonly PackedTerminal[]) =>
  unpackMeasurements(packMeasurements(terminals), AT);

describe('packed measurements', () => {
  it.each(COMBINATIONS.map((parts) => [parts.join(', ') || 'no optional part', parts] as const))(
    'come back exactly as they were: %s',
    (_, parts) => {
      for (let round = 0; round < 50; round += 1) {
        const terminals = Array.from({ length: 1 + (round % 6) }, (_terminal, index) => ({
          terminalId: 1_000_000 * index + round,
          measurement: madeUp(parts),
        }));
        expect(roundTrip(terminals)).toEqual(terminals);
      }
    },
  );

  it('may differ in their parts from one terminal to the next', () => {
    const terminals = COMBINATIONS.slice(0, 6).map((parts, terminalId) => ({
      terminalId,
      measurement: madeUp(parts),
    }));
    expect(roundTrip(terminals)).toEqual(terminals);
  });

  it('of no terminal are no terminal', () => {
    expect(roundTrip([])).toEqual([]);
  });

  it('of six terminals with every part and the longest path fit their column', () => {
    const measurement = madeUp(PARTS);
    // forty characters of three bytes each: the most that the contract lets through
    measurement.channel!.path = '電'.repeat(40);
    const terminals = Array.from({ length: 6 }, (_, terminalId) => ({ terminalId, measurement }));
    expect(packMeasurements(terminals).length).toBeLessThanOrEqual(4096);
    expect(roundTrip(terminals)).toEqual(terminals);
  });

  it('of another version say so instead of being read wrongly', () => {
    const packed = packMeasurements([{ terminalId: 1, measurement: madeUp(['current']) }]);
    packed[0] = 9;
    expect(() => unpackMeasurements(packed, AT)).toThrow(
      'A stored snapshot is packed in version 9, which this release does not read.',
    );
  });
});
