import type { ThresholdPoint, ThresholdPolyline } from './polyline';
import type { SettingProblem } from './setting-problem';

/**
 * Two-slope percentage restraint. Currents are amperes rms primary; slopes are ratios of threshold to
 * restraint (0.3 is 30 %).
 *
 * With pickup P, slopes m₁ and m₂, knee K and restraint r, the threshold up to the knee is
 *   `from-zero`    max(P, m₁·r), the first slope aiming at the origin
 *   `from-pickup`  P + m₁·r, the first slope starting on top of the pickup
 * and beyond it T(K) + m₂·(r − K). Both are in use; the one meant is part of the settings.
 */
export interface TwoSlope {
  readonly kind: 'two-slope';
  readonly pickupAmps: number;
  readonly slope1: number;
  readonly kneeAmps: number;
  readonly slope2: number;
  readonly slopeStart: 'from-zero' | 'from-pickup';
}

const SLOPE_MOST = 2;

/** Keeps the rounding of a division from refusing a knee that is exactly at the corner. */
const CORNER_TOLERANCE = 1e-9;

/** The polyline that the settings compile to. Convex for settings in which `twoSlopeProblems` finds nothing. */
export function twoSlopePolyline(settings: TwoSlope): ThresholdPolyline {
  const { pickupAmps, slope1, kneeAmps, slope2, slopeStart } = settings;
  const start: ThresholdPoint = { restraintAmps: 0, thresholdAmps: pickupAmps };
  if (kneeAmps === 0) return { vertices: [start], finalSlope: slope2 };
  if (slopeStart === 'from-pickup') {
    const knee = { restraintAmps: kneeAmps, thresholdAmps: pickupAmps + slope1 * kneeAmps };
    return { vertices: [start, knee], finalSlope: slope2 };
  }
  const cornerAmps = cornerRestraintAmps(settings);
  const knee = { restraintAmps: kneeAmps, thresholdAmps: Math.max(pickupAmps, slope1 * kneeAmps) };
  if (cornerAmps >= kneeAmps) return { vertices: [start, knee], finalSlope: slope2 };
  const corner = { restraintAmps: cornerAmps, thresholdAmps: pickupAmps };
  return { vertices: [start, corner, knee], finalSlope: slope2 };
}

/** Everything that is wrong with the settings, at once; empty when they can be evaluated. */
export function twoSlopeProblems(settings: TwoSlope): readonly SettingProblem[] {
  const problems: SettingProblem[] = [];
  if (!(isFiniteAtLeastZero(settings.pickupAmps) && settings.pickupAmps > 0)) {
    problems.push({ field: 'pickupAmps', problem: 'The pickup must be a number of amperes above 0.' });
  }
  if (!isSlope(settings.slope1)) {
    problems.push({ field: 'slope1', problem: slopeProblem('first') });
  }
  const knee = kneeProblem(settings);
  if (knee !== undefined) problems.push({ field: 'kneeAmps', problem: knee });
  if (!isSlope(settings.slope2)) {
    problems.push({ field: 'slope2', problem: slopeProblem('second') });
  } else if (settings.slope2 < settings.slope1) {
    problems.push({ field: 'slope2', problem: 'The second slope must not be below the first slope.' });
  }
  return problems;
}

function kneeProblem(settings: TwoSlope): string | undefined {
  if (!isFiniteAtLeastZero(settings.kneeAmps)) return 'The knee must be a number of amperes, 0 or above.';
  if (settings.slopeStart === 'from-pickup' || settings.slope1 === 0) return undefined;
  const kneeAmpsLeast = cornerRestraintAmps(settings) * (1 - CORNER_TOLERANCE);
  // A corner that is not a number is the fault of pickup or slope, which is told there.
  if (Number.isNaN(kneeAmpsLeast) || settings.kneeAmps >= kneeAmpsLeast) return undefined;
  // Rounded up, so that the figure in the sentence is itself allowed.
  const allowedAmps = Math.ceil(kneeAmpsLeast * 10) / 10;
  return `The knee must be at or beyond ${allowedAmps} A, where the first slope leaves the pickup.`;
}

/** Where a first slope from zero leaves the pickup; infinitely far for a slope of 0. */
function cornerRestraintAmps({ pickupAmps, slope1 }: TwoSlope): number {
  return pickupAmps / slope1;
}

function isFiniteAtLeastZero(value: number): boolean {
  return Number.isFinite(value) && value >= 0;
}

function isSlope(value: number): boolean {
  return isFiniteAtLeastZero(value) && value <= SLOPE_MOST;
}

function slopeProblem(which: 'first' | 'second'): string {
  return `The ${which} slope must be a ratio from 0 to ${SLOPE_MOST} (0.3 is 30 %).`;
}
