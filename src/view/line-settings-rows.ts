import type { CharacteristicOnWire, SettingsVersion } from '../contract/settings-version';
import { restraintConvention } from '../protection/restraint';
import { comparedDay } from './line-comparison';
import { ampsText, dateText, percentText, timeText } from './figures';
import { versionInForce } from './trend-pickup';

/** One version of the recorded settings, in words. */
export interface SettingsRow {
  readonly id: number;
  readonly state: 'in force' | 'past' | 'not yet';
  readonly validFrom: string;
  /** the site's day from which it was valid, as an address wants it */
  readonly day: string;
  readonly values: readonly { readonly name: string; readonly value: string }[];
  readonly recorded: string;
  readonly note: string;
}

/** The versions, newest first; the one in force now is marked. */
export function settingsRows(
  settings: readonly SettingsVersion[],
  { nowMs, timeZone }: { nowMs: number; timeZone: string },
): SettingsRow[] {
  const inForce = versionInForce(settings, nowMs);
  return [...settings]
    .sort((one, other) => Date.parse(other.validFrom) - Date.parse(one.validFrom))
    .map((version) => ({
      id: version.id,
      state: stateOf(version, inForce, nowMs),
      validFrom: `${dateText(version.validFrom, timeZone)}, ${timeText(version.validFrom, timeZone).slice(0, 5)}`,
      day: comparedDay(version.validFrom, timeZone),
      values: values(version),
      recorded: `${version.recordedBy}, ${dateText(version.recordedAt, timeZone)}`,
      note: version.note,
    }));
}

function stateOf(
  version: SettingsVersion,
  inForce: SettingsVersion | undefined,
  nowMs: number,
): SettingsRow['state'] {
  if (version.id === inForce?.id) return 'in force';
  return Date.parse(version.validFrom) > nowMs ? 'not yet' : 'past';
}

type Values = SettingsRow['values'];

function values({ characteristic, restraint, chargingCompensation }: SettingsVersion): Values {
  const convention = restraint.kind === 'none' ? [] : [restraintConvention(restraint)];
  return [
    { name: 'kind', value: characteristicName(characteristic.kind) },
    ...characteristicValues(characteristic),
    ...convention.map((value) => ({ name: 'restraint', value })),
    { name: 'charging', value: chargingCompensation ? 'compensated from voltages' : 'not compensated' },
  ];
}

/** A kind of characteristic as a name, to stand where settings are listed. */
export function characteristicName(kind: CharacteristicOnWire['kind']): string {
  switch (kind) {
    case 'two-slope':
      return 'two-slope restraint';
    case 'adaptive':
      return 'adaptive restraint';
    case 'alpha-plane':
      return 'alpha plane';
    case 'phase-comparison':
      return 'phase comparison';
  }
}

function characteristicValues(characteristic: CharacteristicOnWire): Values {
  switch (characteristic.kind) {
    case 'two-slope':
      return [
        { name: 'pickup', value: ampsText(characteristic.pickupAmps) },
        {
          name: 'first slope',
          value: `${percentText(characteristic.slope1)}, ${characteristic.slopeStart === 'from-zero' ? 'from zero' : 'from the pickup'}`,
        },
        { name: 'knee', value: `${ampsText(characteristic.kneeAmps)} restraint` },
        { name: 'second slope', value: percentText(characteristic.slope2) },
      ];
    case 'adaptive':
      return [
        { name: 'pickup', value: ampsText(characteristic.pickupAmps) },
        { name: 'time error', value: `${figureText(characteristic.timeErrorMs)}\u00a0ms` },
        ...characteristic.ctErrors.map(({ terminal, errorBelow, errorAbove, limitAmps }) => ({
          name: terminal,
          value: `${ratioText(errorBelow)} up to ${ampsText(limitAmps)}, ${ratioText(errorAbove)} above`,
        })),
      ];
    case 'alpha-plane':
      return [
        { name: 'pickup', value: ampsText(characteristic.pickupAmps) },
        { name: 'radius', value: figureText(characteristic.radius) },
        { name: 'angle', value: `${figureText(characteristic.angleDeg)}° around 180°` },
      ];
    case 'phase-comparison':
      return [
        { name: 'tolerance', value: `${figureText(characteristic.toleranceDeg)}°` },
        { name: 'release', value: `${ampsText(characteristic.releaseAmps)} at both ends` },
      ];
  }
}

/** A setting as it was typed: no decimals that nobody recorded. */
const figureText = (value: number): string => String(Number(value.toPrecision(6)));
const ratioText = (ratio: number): string => `${figureText(100 * ratio)}\u00a0%`;
