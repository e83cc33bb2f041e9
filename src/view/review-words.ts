import type { SettingsVersion } from '../contract/settings-version';
import { characteristicConvention } from '../protection/characteristic';
import { restraintConvention } from '../protection/restraint';
import type { PickupWindow } from '../protection/pickup-window';
import { ampsText } from './figures';

/** The convention of every figure that the recorded settings decide, to stand in a tooltip and in a table. */
export function conventionWords({
  characteristic,
  restraint,
  chargingCompensation,
}: Pick<SettingsVersion, 'characteristic' | 'restraint' | 'chargingCompensation'>): string {
  return [
    'Amperes rms primary, positive into the line',
    characteristicConvention(characteristic),
    restraint.kind === 'none' ? 'no restraint current' : `restraint is ${restraintConvention(restraint)}`,
    chargingCompensation ? 'charging compensated from voltages' : 'charging not compensated',
  ].join('; ');
}

/** A resistance: "870 Ω", "12 kΩ"; a dash where there is none. */
export function ohmsText(ohms: number | undefined): string {
  if (ohms === undefined || !Number.isFinite(ohms)) return '–';
  if (ohms >= 10_000) return `${Math.round(ohms / 1000)}\u00a0kΩ`;
  return `${ohms >= 10 ? Math.round(ohms) : ohms.toFixed(1)}\u00a0Ω`;
}

/** Where the recorded pickup lies, in a sentence. */
export function pickupWords({ pickupLies, lowerAmps, upperAmps }: PickupWindow, pickupAmps: number): string {
  const pickup = ampsText(pickupAmps);
  switch (pickupLies) {
    case 'within':
      return upperAmps === undefined
        ? `The recorded pickup, ${pickup}, is at or above the lower bound of ${ampsText(lowerAmps)}.`
        : `The recorded pickup, ${pickup}, lies within the window.`;
    case 'below':
      return `The recorded pickup, ${pickup}, is below the lower bound of ${ampsText(lowerAmps)}: it leaves less room over the standing level than asked for.`;
    case 'above':
      return `The recorded pickup, ${pickup}, is above the upper bound of ${ampsText(upperAmps)}: the least internal fault would not reach it.`;
    case 'no window':
      return `There is no window: the lower bound, ${ampsText(lowerAmps)}, is above the upper one, ${ampsText(upperAmps)}.`;
  }
}
