import { magnitude } from './phasor';
import type { Phasor } from './phasor';
import type { ThresholdPolyline } from './polyline';
import type { SettingProblem } from './setting-problem';

/**
 * What the scheme allows for the current transformer of one terminal: its error as a ratio of the current
 * (0.02 is 2 %), up to a limit current in amperes rms primary and above it.
 */
export interface CtErrorAllowance {
  /** the terminal's key in the register */
  readonly terminal: string;
  readonly errorBelow: number;
  readonly errorAbove: number;
  readonly limitAmps: number;
}

/**
 * Adaptive restraint by the sum of errors: the restraint current is the greatest differential current that
 * known errors can explain, and the scheme operates where the differential current reaches it.
 *
 *   I_r = P + Σ e(|I|)·|I| + Σ 2·sin(ω·τ/2)·|I|   and   T = I_r, one slope of 45°
 *
 * with pickup P in amperes, the error e of each terminal's transformer below and above its limit current, and
 * the residual time error τ between the terminals. Schemes of this kind also add terms for the distortion of
 * the sampled waveforms. Those need samples, which a historian of phasors does not hold: they are left out, so
 * that the restraint here is the least one and the utilisation errs on the high side.
 */
export interface Adaptive {
  readonly kind: 'adaptive';
  readonly pickupAmps: number;
  /** one for each terminal; the evaluation pairs them with the currents by their order */
  readonly ctErrors: readonly CtErrorAllowance[];
  /** residual time error between terminals, milliseconds */
  readonly timeErrorMs: number;
}

/** Half a period at 60 Hz, rounded down: beyond it the sine of the time error falls again. */
const TIME_ERROR_MS_MOST = 8;

/**
 * Restraint current in amperes rms primary at a frequency in hertz, which at the same time is the threshold.
 * At exactly the limit current the error below it holds; just above, the restraint steps. Throws when there
 * are not as many currents as transformer errors, and for a frequency that is not above zero.
 */
export function errorSumAmps(settings: Adaptive, currents: readonly Phasor[], frequencyHz: number): number {
  const { ctErrors, pickupAmps, timeErrorMs } = settings;
  if (currents.length !== ctErrors.length) {
    throw new RangeError(
      `${currents.length} currents do not pair with ${ctErrors.length} terminals’ errors.`,
    );
  }
  if (!(frequencyHz > 0)) throw new RangeError(`A frequency is above 0 Hz, which ${frequencyHz} is not.`);
  const timeErrorRatio = 2 * Math.sin((Math.PI * frequencyHz * timeErrorMs) / 1000);
  let restraintAmps = pickupAmps;
  for (let index = 0; index < currents.length; index++) {
    const amps = magnitude(currents[index]!);
    const { errorBelow, errorAbove, limitAmps } = ctErrors[index]!;
    restraintAmps += ((amps <= limitAmps ? errorBelow : errorAbove) + timeErrorRatio) * amps;
  }
  return restraintAmps;
}

/** The threshold as a curve: 45° from the pickup on. A restraint below the pickup does not occur. */
export function adaptivePolyline({ pickupAmps }: Adaptive): ThresholdPolyline {
  const start = { restraintAmps: 0, thresholdAmps: pickupAmps };
  return { vertices: [start, { restraintAmps: pickupAmps, thresholdAmps: pickupAmps }], finalSlope: 1 };
}

/** Everything that is wrong with the settings, at once; empty when they can be evaluated. */
export function adaptiveProblems(settings: Adaptive): readonly SettingProblem[] {
  const problems: SettingProblem[] = [];
  if (!(settings.pickupAmps > 0 && settings.pickupAmps < Infinity)) {
    problems.push({ field: 'pickupAmps', problem: 'The pickup must be a number of amperes above 0.' });
  }
  if (settings.ctErrors.length === 0) {
    problems.push({ field: 'ctErrors', problem: 'State the transformer errors of every terminal.' });
  }
  const keys = settings.ctErrors.map(({ terminal }) => terminal);
  settings.ctErrors.forEach((allowance, index) => {
    problems.push(...allowanceProblems(allowance, `ctErrors.${index}`));
    if (keys.indexOf(allowance.terminal) < index) {
      problems.push({
        field: `ctErrors.${index}.terminal`,
        problem: `The errors of ${allowance.terminal} are stated twice.`,
      });
    }
  });
  if (!(settings.timeErrorMs >= 0 && settings.timeErrorMs <= TIME_ERROR_MS_MOST)) {
    problems.push({
      field: 'timeErrorMs',
      problem: `The residual time error must be a number of milliseconds from 0 to ${TIME_ERROR_MS_MOST}.`,
    });
  }
  return problems;
}

function allowanceProblems(allowance: CtErrorAllowance, path: string): SettingProblem[] {
  const problems: SettingProblem[] = [];
  for (const [field, where] of [
    ['errorBelow', 'up to'],
    ['errorAbove', 'above'],
  ] as const) {
    if (allowance[field] >= 0 && allowance[field] <= 1) continue;
    problems.push({
      field: `${path}.${field}`,
      problem: `The error ${where} the limit current must be a ratio from 0 to 1 (0.02 is 2 %).`,
    });
  }
  if (!(allowance.limitAmps > 0 && allowance.limitAmps < Infinity)) {
    problems.push({
      field: `${path}.limitAmps`,
      problem: 'The limit current must be a number of amperes above 0.',
    });
  }
  return problems;
}
