import { describe, expect, test } from 'vitest';
import { measurementSchema } from '../../src/contract/feed';
import { createDemoMeasurements, SAMPLE_MS } from '../../simulator/demo-history';
import { demoLines } from '../../simulator/network/demo-lines';
import { DAY_MS, dayLevelAmps, differentialAmps, halfSumAmps, only, type Phase } from './plain-differential';

const epochMs = Date.UTC(2026, 2, 2, 9);
const feed = createDemoMeasurements({ seed: 1, epochMs });
const lineOf = (key: string) => demoLines.find((line) => line.key === key)!;
const settingsOf = (key: string) => {
  const { characteristic } = lineOf(key).settings.at(-1)!;
  if (characteristic.kind !== 'two-slope')
    throw new Error(`${key} tells no story by a two-slope characteristic.`);
  return characteristic;
};
const pickupOf = (key: string): number => settingsOf(key).pickupAmps;

/** differential over threshold, of lines whose slope starts from zero and stays below its knee */
function utilisation(key: string, phase: Phase, atMs: number): number {
  const { pickupAmps, slope1 } = settingsOf(key);
  const measurements = feed(key, atMs);
  return (
    differentialAmps(measurements, phase) / Math.max(pickupAmps, slope1 * halfSumAmps(measurements, phase))
  );
}

describe('what the terminals publish', () => {
  test('is the contract’s, for every line', () => {
    for (const line of demoLines)
      for (const { measurement, topic, terminal } of feed(line.key, epochMs)) {
        expect(measurementSchema.parse(measurement)).toEqual(measurement);
        expect(topic).toBe(`feed/${line.key}/${terminal}/measurement`);
      }
  });

  test('counts up by one from one common instant to the next', () => {
    const seq = [0, 1, 2].map((step) => only(feed('skelder-hask', epochMs + step * SAMPLE_MS), 'hask').seq);
    expect(seq).toEqual([seq[0], seq[0]! + 1, seq[0]! + 2]);
  });

  test('is reported magnitudes of the first terminal alone, where the historian holds no more', () => {
    for (const line of demoLines.filter((each) => each.goesBy === 'reported')) {
      const measurements = feed(line.key, epochMs);
      expect(measurements.map((each) => each.terminal)).toEqual([line.terminals[0]!.key]);
      expect(measurements[0]!.measurement.current).toBeUndefined();
      expect(measurements[0]!.measurement.reported).toBeDefined();
    }
  });

  test('agrees with the phasors where a terminal also reports', () => {
    const measurements = feed('skelder-tarn-head', epochMs);
    const { reported } = only(measurements, 'skelder');
    expect(reported!.differential[1]).toBeCloseTo(differentialAmps(measurements, 'b'), 0);
    expect(reported!.restraint[1]).toBeCloseTo(halfSumAmps(measurements, 'b'), 1);
  });

  test('leaves out the voltage of a couple of lines', () => {
    const without = demoLines.filter((line) => feed(line.key, epochMs)[0]!.measurement.voltage === undefined);
    expect(without).toHaveLength(2);
  });
});

describe('the stories in the data', () => {
  test('phase B of Skelder – Low Pell 2 creeps by 3 to 4 A a month and meets the near mark in two to three months', () => {
    // whole weeks, so that the weekend's lighter load weighs alike
    const level = (lastDay: number, phase: Phase = 'b'): number =>
      [0, 1, 2, 3, 4, 5, 6].reduce(
        (sum, day) =>
          sum +
          dayLevelAmps(feed, { line: 'skelder-low-pell-2', phase }, epochMs + (lastDay - day) * DAY_MS) / 7,
        0,
      );
    const near = 0.7 * pickupOf('skelder-low-pell-2');
    const perMonth = ((level(0) - level(-56)) / 56) * 30.4;
    expect(perMonth).toBeGreaterThan(3);
    expect(perMonth).toBeLessThan(4);
    expect(level(50)).toBeLessThan(near);
    expect(level(100)).toBeGreaterThan(near);
    expect(Math.abs(level(0, 'a') - level(-56, 'a'))).toBeLessThan(1);
    expect(utilisation('skelder-low-pell-2', 'b', epochMs)).toBeLessThan(0.55);
  });

  test('Fennick – Low Pell steps nine days back, when its channel takes the reserve path', () => {
    const level = (day: number): number =>
      dayLevelAmps(feed, { line: 'fennick-low-pell', phase: 'a' }, epochMs + day * DAY_MS);
    const channel = (day: number) =>
      only(feed('fennick-low-pell', epochMs + day * DAY_MS), 'low-pell').channel!;
    expect(channel(-9.1).path).toBe('main');
    expect(channel(-8.9).path).toBe('reserve');
    expect(Math.abs(channel(0).send_ms - channel(0).receive_ms)).toBeGreaterThan(0.3);
    expect(Math.abs(channel(-20).send_ms - channel(-20).receive_ms)).toBeLessThan(0.05);
    expect(level(0) - level(-10)).toBeGreaterThan(15);
    expect(Math.abs(level(-10) - level(-40))).toBeLessThan(3);
    expect(level(0)).toBeLessThan(0.5 * pickupOf('fennick-low-pell'));
    expect(only(feed('fennick-low-pell', epochMs), 'low-pell').clock.source).toBe('channel');
  });

  test('charging takes most of the pickup of the Hask – Ostrel cable, and leaves it below the near mark', () => {
    const share =
      dayLevelAmps(feed, { line: 'hask-ostrel-cable', phase: 'a' }, epochMs) / pickupOf('hask-ostrel-cable');
    expect(share).toBeGreaterThan(0.58);
    expect(share).toBeLessThan(0.66);
    for (let hour = 0; hour < 48; hour++)
      for (const phase of ['a', 'b', 'c'] as const)
        expect(utilisation('hask-ostrel-cable', phase, epochMs - hour * 3_600_000)).toBeLessThan(0.69);
  });

  test('Low Pell – Quillby stands near its mark around the clock, and never over', () => {
    for (let hour = 0; hour < 168; hour++) {
      const worst = utilisation('low-pell-quillby', 'c', epochMs - hour * 3_600_000);
      expect(worst).toBeGreaterThan(0.72);
      expect(worst).toBeLessThan(0.8);
    }
  });

  test('Hask – Marrow Gate is out of service: open breakers, no current', () => {
    for (const { measurement } of feed('hask-marrow-gate', epochMs)) {
      expect(measurement.breaker).toBe('open');
      expect(measurement.current!.a[0]).toBeLessThan(0.2);
    }
    expect(lineOf('hask-marrow-gate').inService).toBe(true);
  });

  test('Marrow Gate loses its clock for a minute or so every few hours, and says so', () => {
    const sources = Array.from({ length: 240 }, (_, minute) =>
      only(feed('marrow-gate-ostrel', epochMs + minute * 60_000), 'marrow-gate'),
    ).filter((measurement) => measurement.clock.source === 'free');
    expect(sources.length).toBeGreaterThan(0);
    expect(sources.length).toBeLessThan(6);
    expect(only(feed('marrow-gate-ostrel', epochMs), 'marrow-gate').clock.source).toBe('satellite');
  });

  test('two terminals lose about one message in two thousand', () => {
    const lost = (line: string): number => {
      let count = 0;
      for (let step = 0; step < 20_000; step++)
        if (feed(line, epochMs - step * SAMPLE_MS).length < lineOf(line).terminals.length) count++;
      return count;
    };
    for (const line of ['quillby-hask-1', 'hask-low-pell-brindle']) {
      expect(lost(line)).toBeGreaterThan(2);
      expect(lost(line)).toBeLessThan(25);
    }
  });

  test('every other line that is evaluated is settled between a tenth and a half of its pickup', () => {
    const told = [
      'skelder-low-pell-2',
      'hask-ostrel-cable',
      'low-pell-quillby',
      'hask-marrow-gate',
      'tarn-head-fennick',
    ];
    const byTwoSlopes = demoLines.filter(({ settings }) => {
      const { characteristic, chargingCompensation } = settings.at(-1)!;
      return characteristic.kind === 'two-slope' && !chargingCompensation;
    });
    for (const line of byTwoSlopes.filter((each) => each.goesBy === 'phasors' && !told.includes(each.key))) {
      const worst = Math.max(
        ...(['a', 'b', 'c'] as const).map((phase) => dayLevelAmps(feed, { line: line.key, phase }, epochMs)),
      );
      expect(worst / pickupOf(line.key), line.key).toBeGreaterThan(0.09);
      expect(worst / pickupOf(line.key), line.key).toBeLessThan(0.5);
    }
  });
});
