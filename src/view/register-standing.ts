import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { wallTimeTyped } from './register-instant';
import type { Typed } from './register-typed';

/** What stands in the register, as the fields of a form hold it. */

export function lineTyped(line: RegisterLine): Typed {
  return {
    name: line.name,
    voltageKv: String(line.voltageKv),
    lengthKm: String(line.lengthKm),
    ratingAmps: String(line.ratingAmps),
    emergencyRatingAmps: String(line.emergencyRatingAmps),
    capacitanceNfPerKm: line.capacitanceNfPerKm === null ? '' : String(line.capacitanceNfPerKm),
    kind: line.kind,
    goesBy: line.goesBy,
    ...ticked('inService', line.inService),
    ...ticked('seriesCompensated', line.seriesCompensated),
    ...ticked('hasTransformer', line.inZoneTransformer !== null),
    otherVoltageKv: line.inZoneTransformer === null ? '' : String(line.inZoneTransformer.otherVoltageKv),
    clockNumber: line.inZoneTransformer === null ? '' : String(line.inZoneTransformer.clockNumber),
  };
}

const ticked = (name: string, on: boolean): Typed => (on ? { [name]: 'yes' } : {});

/** A new version starts from the figures of the one in force, valid from now, and with its reason still to be given. */
export function settingsTypedFrom(
  inForce: SettingsVersion | undefined,
  { nowMs, timeZone }: { nowMs: number; timeZone: string },
): Typed {
  const validFrom = wallTimeTyped(nowMs, timeZone);
  if (inForce === undefined)
    return { validFrom, slopeStart: 'from-zero', restraint: 'scaled-sum', factor: '0.5' };
  const { characteristic, restraint } = inForce;
  return {
    validFrom,
    pickupAmps: String(characteristic.pickupAmps),
    kneeAmps: String(characteristic.kneeAmps),
    slope1: percentTyped(characteristic.slope1),
    slope2: percentTyped(characteristic.slope2),
    slopeStart: characteristic.slopeStart,
    restraint: restraint.kind,
    factor: restraint.kind === 'scaled-sum' ? String(restraint.factor) : '0.5',
  };
}

// 0.29 · 100 is 28.999999999999996
const percentTyped = (ratio: number): string => String(Math.round(ratio * 1e8) / 1e6);

const SAVED: Readonly<Record<string, string>> = {
  line: 'The line is added. Give it its terminals and the settings to compare with.',
  facts: 'The facts are saved.',
  terminals: 'The terminals are saved.',
  settings: 'The settings are recorded.',
};

/** What a page says after a form was saved; undefined for anything but a word of ours in the address. */
export const savedSentence = (saved: string | null): string | undefined =>
  saved === null ? undefined : Object.entries(SAVED).find(([what]) => what === saved)?.[1];

/** Substations of the register by name, each once. */
export function knownSubstations(lines: readonly RegisterLine[]): { key: string; name: string }[] {
  const byKey = new Map(
    lines.flatMap(({ terminals }) => terminals.map((one) => [one.substation, one.substationName] as const)),
  );
  return [...byKey]
    .map(([key, name]) => ({ key, name }))
    .sort((one, other) => one.name.localeCompare(other.name, 'en'));
}
