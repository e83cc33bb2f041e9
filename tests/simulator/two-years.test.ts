import { describe, expect, test } from 'vitest';
import { createDemoMeasurements } from '../../simulator/demo-history';
import { demoLines } from '../../simulator/network/demo-lines';
import { towns } from '../../simulator/network/load-shapes';
import { angleRad, magnitude } from '../../simulator/plant/complex';
import { loadShare } from '../../simulator/plant/load';
import { createPlant } from '../../simulator/plant/plant';
import { storyLines, storyTruths } from '../../simulator/stories/story-lines';
import { toldTruths } from '../../simulator/stories/told-truth';
import { newLineSchema } from '../../src/contract/register';
import { DAY_MS, dayLevelAmps } from './plain-differential';

const epochMs = Date.UTC(2026, 0, 12, 9);
const site = { seed: 1, epochMs };
const plant = createPlant(storyTruths, site);
const feed = createDemoMeasurements(site);
const on = (day: number): number => epochMs + day * DAY_MS;
const truthOf = (line: string, phase: string) =>
  toldTruths(storyTruths, epochMs).find((told) => told.line === line && told.phase === phase)!;
/** measured over true current, of one terminal and phase */
const shown = (line: string, [terminal, phase]: readonly [number, 0 | 1 | 2], day: number) => {
  const state = plant.state(line, on(day)).terminals[terminal]!;
  return {
    ratio: magnitude(state.amps[phase]) / magnitude(state.trueFlow[phase].amps) - 1,
    angleRad: angleRad(state.amps[phase]) - angleRad(state.trueFlow[phase].amps),
  };
};

describe('the story lines', () => {
  test('are a network of their own, and what the register takes', () => {
    const keys = storyLines.map(({ key }) => key);
    expect(new Set([...keys, ...demoLines.map(({ key }) => key)]).size).toBe(keys.length + demoLines.length);
    for (const line of storyLines) expect(newLineSchema.parse(line)).toEqual(line);
  });

  test('have their settings in force two years before the site came up', () => {
    for (const { settings } of storyLines) expect(Date.parse(settings[0]!.validFrom)).toBeLessThan(on(-731));
  });
});

describe('the plant over years', () => {
  test('lets load grow by its yearly share, and swing between a winter peak and a summer low', () => {
    const flat = towns(0.5);
    const share = (profile: typeof flat, day: number): number =>
      loadShare(profile, 3, { atMs: on(day), epochMs });
    for (const day of [-730.5, -365.25, 0])
      expect(share({ ...flat, growthPerYear: 0.08 }, day) / share(flat, day)).toBeCloseTo(
        1.08 ** (day / 365.25),
        9,
      );
    const season = (day: number): number => share({ ...flat, yearlySwing: 0.2 }, day) / share(flat, day);
    expect(season(3)).toBeCloseTo(1.2, 3);
    expect(season(-180)).toBeCloseTo(0.8, 3);
    expect(season(3 - 731)).toBeCloseTo(season(3), 3);
  });

  test('lets the capacitance of one phase grow, and of no other', () => {
    const charging = (phase: 0 | 1 | 2, day: number): number => {
      const [one, other] = plant.state('rimside-pellan-cross', on(day)).terminals;
      const [i, j] = [one!.trueFlow[phase], other!.trueFlow[phase]];
      return Math.hypot(i.amps.re + j.amps.re, i.amps.im + j.amps.im) / magnitude(i.volts);
    };
    expect(charging(2, -10) / charging(2, -400)).toBeCloseTo(1 + 0.0006 * 290, 2);
    expect(charging(0, -10) / charging(0, -400)).toBeCloseTo(1, 2);
  });

  test('puts one transformer in the place of another on its day', () => {
    expect(shown('dunmarsh-rimside', [1, 1], -40.3).ratio).toBeCloseTo(-0.026, 3);
    expect(shown('dunmarsh-rimside', [1, 1], -40.5).ratio).toBeGreaterThan(-0.006);
    expect(shown('dunmarsh-rimside', [1, 0], -40.3).ratio).toBeCloseTo(
      shown('dunmarsh-rimside', [1, 0], -40.5).ratio,
      2,
    );
  });

  test('lets a clock run off slowly while its terminal takes it for right', () => {
    const moved =
      shown('rimside-calder-stye', [1, 0], -20).angleRad -
      shown('rimside-calder-stye', [1, 0], -220).angleRad;
    expect(moved).toBeCloseTo(-0.3 * 200 * 1e-6 * 2 * Math.PI * 50, 3);
    const { clock } = feed('rimside-calder-stye', on(-20))[1]!.measurement;
    expect(clock.source).toBe('satellite');
    expect(clock.error_us).toBeLessThan(5);
  });

  test('keeps a terminal silent for its month, and the other one not', () => {
    const heard = (day: number) => feed('rimside-dunmarsh-east', on(day)).map(({ terminal }) => terminal);
    expect(heard(-33.1)).toEqual(['rimside', 'dunmarsh']);
    expect([heard(-33), heard(-15), heard(-2.1)]).toEqual([['rimside'], ['rimside'], ['rimside']]);
    expect(heard(-2)).toEqual(['rimside', 'dunmarsh']);
  });
});

describe('the truth that is told', () => {
  const week = (where: Parameters<typeof dayLevelAmps>[1], lastDay: number): number =>
    [0, 1, 2, 3, 4, 5, 6].reduce((sum, back) => sum + dayLevelAmps(feed, where, on(lastDay - back)) / 7, 0);

  test.each([
    ['dunmarsh-oxhollow', 'a'],
    ['calder-stye-oxhollow', 'c'],
    ['rimside-pellan-cross', 'c'],
    ['rimside-calder-stye', 'b'],
    ['oxhollow-pellan-cross', 'b'],
  ] as const)('has the rise that the published phasors of %s show, or a little more', (line, phase) => {
    const rise = ((week({ line, phase }, 0) - week({ line, phase }, -112)) / 112) * (365.25 / 12);
    expect(rise / truthOf(line, phase).slopeAmpsPerMonth!).toBeGreaterThan(0.75);
    expect(rise / truthOf(line, phase).slopeAmpsPerMonth!).toBeLessThan(1.05);
  });

  test('names a phase of each line that something happens to, and none of the settled ones', () => {
    const named = toldTruths(storyTruths, epochMs).filter(({ cause }) => cause !== null);
    expect(new Set(named.map(({ line }) => line))).toEqual(
      new Set([
        'dunmarsh-oxhollow',
        'calder-stye-oxhollow',
        'rimside-pellan-cross',
        'rimside-calder-stye',
        'dunmarsh-rimside',
        'dunmarsh-pellan-cross',
        'oxhollow-pellan-cross',
      ]),
    );
  });
});
