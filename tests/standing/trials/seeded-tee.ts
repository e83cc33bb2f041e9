/**
 * One phase of a made-up line with three terminals, hour by hour, as `seeded-line.ts` has it for two: the first
 * terminal feeds two branches, whose loads have cycles and noise of their own, or the third feeds in too. It shares
 * nothing with src/.
 */

import { normalOf, polar, remembering, uniform } from './seeded-line';
import type { Pair } from './seeded-line';

/** What is physically so with the line. Currents A rms, voltages kV phase to earth, angles radians. */
export interface TeeTruth {
  readonly seed: number;
  readonly ratingAmps: number;
  readonly voltageKv: number;
  readonly susceptanceMillisiemens: number;
  /** e of the second and of the third terminal against the first. */
  readonly mismatches: readonly [Pair, Pair];
  /** Mean load of either branch as a share of the rating. */
  readonly loadShares: readonly [number, number];
  /** The third terminal feeds in what it would else take. */
  readonly feedsIn: boolean;
  /** The third branch follows the second in size and angle, in the ratio of their mean loads. */
  readonly isProportional?: boolean;
  readonly seasonShare: number;
  readonly growthShareAYear: number;
  readonly noiseShare: number;
}

/** What the terminals of the phase measure in one hour. */
export interface TeeHour {
  readonly hour: number;
  readonly voltageKv: Pair;
  readonly others: readonly [Pair, Pair];
  readonly differential: Pair;
  readonly throughAmps: number;
}

const HOURS_A_YEAR = 8766;

export function* teeHours(truth: TeeTruth, hours: number): Generator<TeeHour> {
  const random = uniform(truth.seed);
  const normal = normalOf(random);
  const phase = { year: random() * 6.28, angle: random() * 6.28 };
  const branches = [branchLoad(random), branchLoad(random)] as const;
  const voltageNoise = remembering(normal, 6);
  const errors = [currentError(truth, random), currentError(truth, random)] as const;
  for (let hour = 0; hour < hours; hour++) {
    const year = 1 + truth.seasonShare * Math.sin((2 * Math.PI * hour) / HOURS_A_YEAR + phase.year);
    const common = year * (1 + (truth.growthShareAYear * hour) / HOURS_A_YEAR) * truth.ratingAmps;
    const volts = truth.voltageKv * (1 + 0.01 * voltageNoise());
    const absolute = phase.angle + 2.4 * hour;
    const loads = branches.map((branch) => branch(hour)) as [Load, Load];
    if (truth.isProportional === true) loads[1] = loads[0];
    const taken = loads.map(({ factor, lag }, k) =>
      polar(Math.max(0.02, truth.loadShares[k]! * factor) * common, absolute - lag),
    );
    const sign = truth.feedsIn ? 1 : -1;
    const second = { re: -taken[0]!.re, im: -taken[0]!.im };
    const third = { re: sign * taken[1]!.re, im: sign * taken[1]!.im };
    const charging = polar(truth.susceptanceMillisiemens * volts, absolute + Math.PI / 2);
    const first = { re: charging.re - second.re - third.re, im: charging.im - second.im - third.im };
    const others = [errors[0](second, truth.mismatches[0]), errors[1](third, truth.mismatches[1])] as const;
    yield {
      hour,
      voltageKv: polar(volts, absolute),
      others,
      differential: {
        re: first.re + others[0].re + others[1].re,
        im: first.im + others[0].im + others[1].im,
      },
      throughAmps: (sizeOf(first) + sizeOf(others[0]) + sizeOf(others[1])) / 2,
    };
  }
}

const sizeOf = ({ re, im }: Pair): number => Math.hypot(re, im);

interface Load {
  /** Of the branch's mean load. */
  readonly factor: number;
  readonly lag: number;
}

/** A branch's load, hour by hour: a daily cycle of its own, weekends, and noise. */
function branchLoad(random: () => number): (hour: number) => Load {
  const normal = normalOf(random);
  const dayPhase = 1.5 * random();
  const swing = 0.2 + 0.2 * random();
  const lagMean = 0.1 + 0.25 * random();
  const loadNoise = remembering(normal, 9);
  const factorNoise = remembering(normal, 14);
  return (hour) => {
    const cycle = (2 * Math.PI * hour) / 24;
    const day = 1 + swing * (Math.sin(cycle + dayPhase) + 0.4 * loadNoise());
    const week = Math.floor(hour / 24) % 7 >= 5 ? 1 - swing / 2 : 1;
    return { factor: day * week, lag: lagMean + 0.1 * factorNoise() + 0.08 * Math.sin(cycle) };
  };
}

/** What a terminal makes of its current: the mismatch with noise that remembers hours, and some that remembers days. */
function currentError(truth: TeeTruth, random: () => number): (current: Pair, mismatch: Pair) => Pair {
  const normal = normalOf(random);
  const noiseHours = 2 + 6 * random();
  const noise = [remembering(normal, noiseHours), remembering(normal, noiseHours)] as const;
  const wander = [remembering(normal, 70), remembering(normal, 70)] as const;
  return (current, mismatch) => {
    const floor = (truth.ratingAmps * truth.noiseShare) / 10 / sizeOf(current);
    const re = mismatch.re + (truth.noiseShare + floor) * noise[0]() + 0.0002 * wander[0]();
    const im = mismatch.im + (truth.noiseShare + floor) * noise[1]() + 0.0002 * wander[1]();
    return {
      re: current.re + re * current.re - im * current.im,
      im: current.im + re * current.im + im * current.re,
    };
  };
}

/** A settled line of three terminals, drawn by its number; one in three is fed from two sides. */
export function drawnTee(seed: number): TeeTruth {
  const random = uniform(seed * 49979687 + 13);
  const between = (low: number, high: number) => low + (high - low) * random();
  const ratingAmps = between(400, 2000);
  const voltageKv = [110, 220, 380][Math.floor(3 * random())]! / Math.sqrt(3);
  const mismatch = () => ({ re: between(-0.015, 0.015), im: between(-0.02, 0.02) });
  return {
    seed,
    ratingAmps,
    voltageKv,
    susceptanceMillisiemens: (ratingAmps * between(0.01, 0.1)) / voltageKv,
    mismatches: [mismatch(), mismatch()],
    loadShares: [between(0.15, 0.35), between(0.1, 0.25)],
    feedsIn: random() < 1 / 3,
    seasonShare: between(0, 0.35),
    growthShareAYear: between(0, 0.12),
    noiseShare: between(0.0003, 0.0012),
  };
}
