import type { SettingsVersion } from '../contract/settings-version';
import { restraintConvention } from '../protection/restraint';
import { dateText, timeText, zoneText } from './figures';
import { percentTyped } from './register-amount';

/** One setting in two versions, as texts; undefined where a version has no such setting. */
export interface ComparedSetting {
  readonly name: string;
  readonly from: string | undefined;
  readonly to: string | undefined;
  readonly changed: boolean;
}

export interface ComparedVersions {
  readonly settings: readonly ComparedSetting[];
  /** when, why and by whom: these differ between any two versions and are no change of settings */
  readonly record: readonly ComparedSetting[];
}

/** Two versions field by field, in the order in which a form asks for them. */
export function comparedVersions(
  from: SettingsVersion,
  to: SettingsVersion,
  timeZone: string,
): ComparedVersions {
  return {
    settings: [
      ...compared(characteristicFields(from.characteristic), characteristicFields(to.characteristic)),
      ...compared(conventionFields(from), conventionFields(to)),
    ],
    record: compared(recordFields(from, timeZone), recordFields(to, timeZone)),
  };
}

/** "Three settings differ." */
export function comparedSentence({ settings }: ComparedVersions): string {
  const changed = settings.filter((setting) => setting.changed).length;
  if (changed === 0) return 'The two versions have the same settings.';
  return changed === 1 ? 'One setting differs.' : `${changed} settings differ.`;
}

/** Why the two drawings must be read with care; undefined when they need not. */
export function conventionCaution({ from, to }: ComparedPair): string | undefined {
  const [before, after] = [restraintConvention(from.restraint), restraintConvention(to.restraint)];
  if (before === after || from.characteristic.kind !== to.characteristic.kind) return undefined;
  return `The restraint is the ${before} in the earlier version and the ${after} in the later one: the same currents do not lie above one another.`;
}

export interface ComparedPair {
  readonly from: SettingsVersion;
  readonly to: SettingsVersion;
}

/** The version that comes before another in time; what a comparison begins with unless asked for others. */
export function comparedPair(
  settings: readonly SettingsVersion[],
  { from, to, inForceId }: { from: number; to: number; inForceId: number | undefined },
): ComparedPair | undefined {
  const byId = (id: number | undefined) => settings.find((version) => version.id === id);
  const later = byId(to) ?? byId(inForceId) ?? settings.at(-1);
  if (later === undefined) return undefined;
  const before = settings[settings.indexOf(later) - 1];
  const earlier = byId(from) ?? before ?? settings.find((version) => version !== later);
  return earlier && { from: earlier, to: later };
}

type Fields = readonly (readonly [string, string])[];

function compared(from: Fields, to: Fields): ComparedSetting[] {
  const [before, after] = [new Map(from), new Map(to)];
  const names = [...new Set([...before.keys(), ...after.keys()])];
  return names.map((name) => ({
    name,
    from: before.get(name),
    to: after.get(name),
    changed: before.get(name) !== after.get(name),
  }));
}

const conventionFields = ({ restraint, chargingCompensation }: SettingsVersion): Fields => [
  ['restraint', restraintConvention(restraint)],
  ['charging current', chargingCompensation ? 'compensated' : 'not compensated'],
];

// Figures in full: two versions that differ in a decimal must not look alike
const exactAmps = (amps: number): string => `${amps} A`;
const percent = (ratio: number): string => `${percentTyped(ratio)} %`;

function characteristicFields(characteristic: SettingsVersion['characteristic']): Fields {
  switch (characteristic.kind) {
    case 'two-slope':
      return [
        ['characteristic', 'two-slope restraint'],
        ['pickup', exactAmps(characteristic.pickupAmps)],
        ['first slope', percent(characteristic.slope1)],
        [
          'first slope is',
          characteristic.slopeStart === 'from-zero' ? 'aimed at zero' : 'on top of the pickup',
        ],
        ['knee', exactAmps(characteristic.kneeAmps)],
        ['second slope', percent(characteristic.slope2)],
      ];
    case 'adaptive':
      return [
        ['characteristic', 'adaptive restraint'],
        ['pickup', exactAmps(characteristic.pickupAmps)],
        ['residual time error', `${characteristic.timeErrorMs} ms`],
        ...characteristic.ctErrors.map(
          ({ terminal, errorBelow, errorAbove, limitAmps }) =>
            [
              `errors at ${terminal}`,
              `${percent(errorBelow)}, ${percent(errorAbove)} beyond ${exactAmps(limitAmps)}`,
            ] as const,
        ),
      ];
    case 'alpha-plane':
      return [
        ['characteristic', 'alpha plane'],
        ['pickup', exactAmps(characteristic.pickupAmps)],
        ['radius', String(characteristic.radius)],
        ['angle', `${characteristic.angleDeg}°`],
      ];
    case 'phase-comparison':
      return [
        ['characteristic', 'phase comparison'],
        ['tolerance angle', `${characteristic.toleranceDeg}°`],
        ['release current', exactAmps(characteristic.releaseAmps)],
      ];
  }
}

const recordFields = (version: SettingsVersion, timeZone: string): Fields => [
  ['valid from', whenText(version.validFrom, timeZone)],
  ['why', version.note],
  ['recorded by', version.recordedBy],
  ['recorded', whenText(version.recordedAt, timeZone)],
];

/** "12 May 2026, 14:32 CEST" */
export const whenText = (instant: string, timeZone: string): string =>
  `${dateText(instant, timeZone)}, ${timeText(instant, timeZone).slice(0, 5)} ${zoneText(instant, timeZone)}`;
