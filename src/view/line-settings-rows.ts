import type { SettingsVersion } from '../contract/settings-version';
import { restraintConvention } from '../protection/restraint';
import { ampsText, dateText, percentText, timeText } from './figures';
import { versionInForce } from './trend-pickup';

/** One version of the recorded settings, in words. */
export interface SettingsRow {
  readonly id: number;
  readonly state: 'in force' | 'past' | 'not yet';
  readonly validFrom: string;
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

function values({ characteristic, restraint }: SettingsVersion): SettingsRow['values'] {
  const { pickupAmps, slope1, kneeAmps, slope2, slopeStart } = characteristic;
  return [
    { name: 'pickup', value: ampsText(pickupAmps) },
    {
      name: 'first slope',
      value: `${percentText(slope1)}, ${slopeStart === 'from-zero' ? 'from zero' : 'from the pickup'}`,
    },
    { name: 'knee', value: `${ampsText(kneeAmps)} restraint` },
    { name: 'second slope', value: percentText(slope2) },
    { name: 'restraint', value: restraintConvention(restraint) },
  ];
}
