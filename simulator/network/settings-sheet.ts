import type { NewSettingsVersion } from '../../src/contract/register';

type Slopes = {
  readonly pickupAmps: number;
  readonly slope1: number;
  readonly kneeAmps: number;
  readonly slope2: number;
  readonly slopeStart: 'from-zero' | 'from-pickup';
};

const version = (
  [from, note]: readonly [string, string],
  slopes: Slopes,
  restraint: NewSettingsVersion['restraint'],
): NewSettingsVersion => ({
  validFrom: `${from}T08:00:00Z`,
  characteristic: { kind: 'two-slope', ...slopes },
  restraint,
  chargingCompensation: false,
  note,
});

const HALF_SUM: NewSettingsVersion['restraint'] = { kind: 'scaled-sum', factor: 0.5 };

/** A version restrained by half the sum of the terminals' magnitudes. */
export const halfSum = (
  from: string,
  slopes: Slopes,
  note = 'Copied from the setting sheet.',
): NewSettingsVersion => version([from, note], slopes, HALF_SUM);

/** A version restrained by the greatest of the terminals' magnitudes. */
export const greatest = (
  from: string,
  slopes: Slopes,
  note = 'Copied from the setting sheet.',
): NewSettingsVersion => version([from, note], slopes, { kind: 'maximum' });

/** Two slopes that begin at the origin: flat at the pickup until the first slope meets it. */
export const fromZero = (
  pickupAmps: number,
  [slope1, kneeAmps, slope2]: readonly [number, number, number],
): Slopes => ({ pickupAmps, slope1, kneeAmps, slope2, slopeStart: 'from-zero' });

/** Two slopes that begin at the pickup. */
export const fromPickup = (
  pickupAmps: number,
  [slope1, kneeAmps, slope2]: readonly [number, number, number],
): Slopes => ({ pickupAmps, slope1, kneeAmps, slope2, slopeStart: 'from-pickup' });

/** The same settings in a scheme that takes the charging current out of the differential. */
export const compensated = (settings: NewSettingsVersion): NewSettingsVersion => ({
  ...settings,
  chargingCompensation: true,
});

const COPIED = 'Copied from the setting sheet.';

type Of<Kind extends NewSettingsVersion['characteristic']['kind']> = Omit<
  Extract<NewSettingsVersion['characteristic'], { kind: Kind }>,
  'kind'
>;

const ofKind = (
  from: string,
  characteristic: NewSettingsVersion['characteristic'],
  restraint: NewSettingsVersion['restraint'],
): NewSettingsVersion => ({
  validFrom: `${from}T08:00:00Z`,
  characteristic,
  restraint,
  chargingCompensation: false,
  note: COPIED,
});

export const alphaPlane = (from: string, settings: Of<'alpha-plane'>): NewSettingsVersion =>
  ofKind(from, { kind: 'alpha-plane', ...settings }, { kind: 'none' });

export const phaseComparison = (from: string, settings: Of<'phase-comparison'>): NewSettingsVersion =>
  ofKind(from, { kind: 'phase-comparison', ...settings }, { kind: 'none' });

export const adaptive = (from: string, settings: Of<'adaptive'>): NewSettingsVersion =>
  ofKind(from, { kind: 'adaptive', ...settings }, { kind: 'error-sum' });
