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
