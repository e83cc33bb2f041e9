import type { SettingsVersion } from '../contract/settings-version';
import { pickupAmps } from '../protection/characteristic';
import type { TrendWindow } from './trend-span';

/** The pickup over the time that its version was in force, in the unit asked for. */
export interface PickupStep {
  readonly fromMs: number;
  readonly toMs: number;
  readonly pickup: number;
}

/**
 * The recorded pickup over a window, each version for the time it was in force; nothing before the first, and
 * nothing while a scheme without a pickup was in force.
 */
export function pickupSteps(
  settings: readonly SettingsVersion[],
  window: TrendWindow,
  unitAmps = 1,
): PickupStep[] {
  const versions = settings
    .map((version) => ({
      fromMs: Date.parse(version.validFrom),
      pickupAmps: pickupAmps(version.characteristic),
    }))
    .sort((one, other) => one.fromMs - other.fromMs);
  return versions
    .map((version, index) => ({
      fromMs: Math.max(version.fromMs, window.fromMs),
      toMs: Math.min(versions[index + 1]?.fromMs ?? Infinity, window.toMs),
      pickupAmps: version.pickupAmps,
    }))
    .filter((step) => step.toMs > step.fromMs)
    .flatMap(({ pickupAmps, ...step }) =>
      pickupAmps === undefined ? [] : [{ ...step, pickup: pickupAmps / unitAmps }],
    );
}

/** The version in force at an instant; undefined before the first. */
export function versionInForce(
  settings: readonly SettingsVersion[],
  atMs: number,
): SettingsVersion | undefined {
  return settings
    .filter((version) => Date.parse(version.validFrom) <= atMs)
    .reduce<SettingsVersion | undefined>(
      (newest, version) =>
        newest === undefined || Date.parse(version.validFrom) >= Date.parse(newest.validFrom)
          ? version
          : newest,
      undefined,
    );
}
