/**
 * One phase of a made-up line with two terminals, hour by hour: the truth that the trials hold the arithmetic
 * against. It shares nothing with src/. Load has a daily, a weekly and a yearly cycle and may grow; noise
 * remembers hours, and what wanders slowly remembers days.
 */

export interface Pair {
  readonly re: number;
  readonly im: number;
}

/** What is physically so with the line. Currents A rms, voltages kV phase to earth, angles radians. */
export interface LineTruth {
  readonly seed: number;
  readonly ratingAmps: number;
  readonly voltageKv: number;
  readonly susceptanceMillisiemens: number;
  /** e of the second terminal against the first. */
  readonly mismatch: Pair;
  /** Mean load as a share of the rating. */
  readonly loadShare: number;
  /** Swing of the yearly cycle, and growth a year, as shares of the mean load. */
  readonly seasonShare?: number;
  readonly growthShareAYear?: number;
  /** Swing of the daily cycle, as a share of the mean load; 0.3 unless given. */
  readonly daySwing?: number;
  /** Swing of the daily cycle of the power-factor angle, radians; 0.08 unless given. */
  readonly lagSwingRad?: number;
  /** Rms of the noise as a share of the current; 0.0006 unless given. And its correlation time, hours. */
  readonly noiseShare?: number;
  readonly noiseHours?: number;
  /** Transformer error that grows at small current: so much at 10 % of the rating, falling with the current. */
  readonly smallCurrentError?: number;
  /** Whose current it falls with; the first terminal's unless given. */
  readonly smallCurrentAt?: 'first' | 'second';
  /** What is added to e and to the susceptance at an hour since the start. */
  readonly mismatchChange?: (hour: number) => Pair;
  readonly susceptanceChange?: (hour: number) => number;
}

/** What the terminals of the phase measure in one hour. */
export interface MeasuredHour {
  readonly hour: number;
  readonly voltageKv: Pair;
  readonly first: Pair;
  readonly second: Pair;
  readonly differential: Pair;
  readonly throughAmps: number;
}

const HOURS_A_YEAR = 8766;

export function* measuredHours(truth: LineTruth, hours: number): Generator<MeasuredHour> {
  const random = uniform(truth.seed);
  const normal = normalOf(random);
  const noiseHours = truth.noiseHours ?? 2 + 6 * random();
  const phase = { year: random() * 6.28, day: random() * 1.5, angle: random() * 6.28 };
  const loadNoise = remembering(normal, 9);
  const factorNoise = remembering(normal, 14);
  const voltageNoise = remembering(normal, 6);
  const noise = [remembering(normal, noiseHours), remembering(normal, noiseHours)];
  const wander = [remembering(normal, 70), remembering(normal, 70)];
  for (let hour = 0; hour < hours; hour++) {
    const year = 1 + (truth.seasonShare ?? 0) * Math.sin((2 * Math.PI * hour) / HOURS_A_YEAR + phase.year);
    const growth = 1 + ((truth.growthShareAYear ?? 0) * hour) / HOURS_A_YEAR;
    const swing = truth.daySwing ?? 0.3;
    const day = 1 + swing * (Math.sin((2 * Math.PI * hour) / 24 + phase.day) + 0.4 * loadNoise());
    const week = Math.floor(hour / 24) % 7 >= 5 ? 1 - swing / 2 : 1;
    const amps = Math.max(0.04, truth.loadShare * year * growth * day * week) * truth.ratingAmps;
    const lagSwing = (truth.lagSwingRad ?? 0.08) * Math.sin((2 * Math.PI * hour) / 24);
    const lag = 0.2 + 0.1 * factorNoise() + lagSwing;
    const volts = truth.voltageKv * (1 + 0.01 * voltageNoise());
    const absolute = phase.angle + 2.4 * hour;
    const voltage = polar(volts, absolute);
    const trueFirst = polar(amps, absolute - lag);
    const susceptance = truth.susceptanceMillisiemens + (truth.susceptanceChange?.(hour) ?? 0);
    const charging = polar(susceptance * volts, absolute + Math.PI / 2);
    const trueSecond = { re: charging.re - trueFirst.re, im: charging.im - trueFirst.im };
    const share = truth.noiseShare ?? 0.0006;
    const floor = (truth.ratingAmps * share) / 10 / amps;
    const change = truth.mismatchChange?.(hour) ?? { re: 0, im: 0 };
    const own = truth.smallCurrentAt === 'second' ? Math.hypot(trueSecond.re, trueSecond.im) : amps;
    const bent = ((truth.smallCurrentError ?? 0) * 0.1 * truth.ratingAmps) / own;
    const e = {
      re: truth.mismatch.re + change.re + bent + (share + floor) * noise[0]!() + 0.0002 * wander[0]!(),
      im: truth.mismatch.im + change.im + bent + (share + floor) * noise[1]!() + 0.0002 * wander[1]!(),
    };
    const second = {
      re: trueSecond.re + e.re * trueSecond.re - e.im * trueSecond.im,
      im: trueSecond.im + e.re * trueSecond.im + e.im * trueSecond.re,
    };
    const differential = { re: trueFirst.re + second.re, im: trueFirst.im + second.im };
    yield { hour, voltageKv: voltage, first: trueFirst, second, differential, throughAmps: amps };
  }
}

/** Uniform numbers from 0 to 1 (mulberry32): close seeds give unrelated streams. */
export function uniform(seed: number): () => number {
  let state = seed | 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** Normal numbers of mean 0 and standard deviation 1 (Box and Muller). */
export const normalOf = (random: () => number) => (): number =>
  Math.sqrt(-2 * Math.log(random() + 1e-12)) * Math.cos(2 * Math.PI * random());

/** First-order autoregressive noise of standard deviation 1 with this correlation time in steps. */
export function remembering(normal: () => number, time: number): () => number {
  const keep = Math.exp(-1 / time);
  const fresh = Math.sqrt(1 - keep * keep);
  let value = normal();
  return () => (value = keep * value + fresh * normal());
}

export function polar(size: number, angle: number): Pair {
  return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
}

/** A settled line drawn at random: what is true of it, and how its load and noise go. */
export function drawnTruth(seed: number, random: () => number): LineTruth {
  const between = (low: number, high: number) => low + (high - low) * random();
  const ratingAmps = between(400, 2000);
  const voltageKv = [110, 220, 380][Math.floor(3 * random())]! / Math.sqrt(3);
  return {
    seed,
    ratingAmps,
    voltageKv,
    susceptanceMillisiemens: (ratingAmps * between(0.01, 0.1)) / voltageKv,
    mismatch: { re: between(-0.015, 0.015), im: between(-0.02, 0.02) },
    loadShare: between(0.25, 0.55),
    seasonShare: between(0, 0.35),
    growthShareAYear: between(0, 0.12),
    noiseShare: between(0.0003, 0.0012),
    smallCurrentError: between(0, 0.001),
  };
}
