import type { InZoneTransformer, RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { wallTimeTyped } from './register-instant';
import { schemeTyped, STARTING_SCHEME } from './register-scheme-typed';
import type { Typed } from './register-form';
import { behindField } from './register-typed';

/** What stands in the register, as the fields of a form hold it. */

export function lineTyped(line: RegisterLine): Typed {
  return {
    name: line.name,
    owner: line.owner ?? '',
    voltageKv: String(line.voltageKv),
    lengthKm: String(line.lengthKm),
    ratingAmps: String(line.ratingAmps),
    emergencyRatingAmps: String(line.emergencyRatingAmps),
    capacitanceNfPerKm: figureTyped(line.capacitanceNfPerKm),
    kind: line.kind,
    goesBy: line.goesBy,
    ...ticked('inService', line.inService),
    ...ticked('seriesCompensated', line.seriesCompensated),
    ...ticked('hasTransformer', line.inZoneTransformer !== null),
    leastInternalFaultAmps: figureTyped(line.leastInternalFaultAmps),
    ...transformerTyped(line.inZoneTransformer),
  };
}

const figureTyped = (value: number | null): string => (value === null ? '' : String(value));

function transformerTyped(transformer: InZoneTransformer | null): Typed {
  // What a form begins with when there is none yet: the more usual of the two for either winding
  if (transformer === null) return { removesLineZero: 'yes', removesOtherZero: 'yes' };
  const { otherVoltageKv, clockNumber, otherTerminals, removesZeroSequence } = transformer;
  return {
    ...{ otherVoltageKv: String(otherVoltageKv), clockNumber: String(clockNumber) },
    ...Object.fromEntries(otherTerminals.map((key) => [behindField(key), 'yes'])),
    ...ticked('removesLineZero', removesZeroSequence.line),
    ...ticked('removesOtherZero', removesZeroSequence.other),
  };
}

const ticked = (name: string, on: boolean): Typed => (on ? { [name]: 'yes' } : {});

/** A new version starts from the figures of the one in force, valid from now, and with its reason still to be given. */
export function settingsTypedFrom(
  inForce: SettingsVersion | undefined,
  { nowMs, timeZone }: { nowMs: number; timeZone: string },
): Typed {
  const validFrom = wallTimeTyped(nowMs, timeZone);
  if (inForce === undefined) return { validFrom, ...STARTING_SCHEME };
  const { chargingCompensation } = inForce;
  return { validFrom, ...schemeTyped(inForce), ...ticked('chargingCompensation', chargingCompensation) };
}

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
