import type { StandingVerdict } from '../../contract/standing';
import type { PhaseName } from '../../protection/phase';
import { compensatedSums } from '../../standing/compensated-sums';
import type { CompositionSums } from '../../standing/composition-sums';
import { loadDependence } from '../../standing/load-dependence';
import { unpackSums } from '../../store/composition-packing';
import { alikeWindows } from '../../view/day-sums';
import type { ComposedWindow, Composing } from './composed-window';
import { isTold } from './likely-cause';
import { type LineHistory, rowsOf } from './line-history';

const HOUR_MS = 3_600_000;
const DAY_HOURS = 24;
const DEGREES = 180 / Math.PI;

/**
 * Whether the mismatch of the window is another at light load than at heavy load, from its hours: then the charging’s
 * own interval is narrower than the truth, and the wider one goes with it. Null where it is not significant.
 */
export function loadDependenceOf(
  { line, frequencyHz, compensatedMillisiemens }: Composing,
  history: LineHistory,
  { phase, now: { composition, range } }: { phase: PhaseName; now: ComposedWindow },
): StandingVerdict['loadDependence'] {
  if (!isTold(composition) || composition.voltageKv === undefined) return null;
  const asCompensated = (sums: CompositionSums) =>
    (compensatedMillisiemens > 0 ? compensatedSums(sums, compensatedMillisiemens) : undefined) ?? sums;
  const hours = rowsOf(history.hours, phase).flatMap((row) => {
    const hour = row.start.getTime() / HOUR_MS;
    const isWithin = hour >= range.from * DAY_HOURS && hour < range.to * DAY_HOURS;
    const sums = isWithin ? unpackSums(row.sums) : undefined;
    return sums === undefined ? [] : [{ hour, sums: asCompensated(sums) }];
  });
  const found = loadDependence(alikeWindows(hours), { frequencyHz });
  const terminal = found.kind === 'told' ? line.expected[found.terminal] : undefined;
  const against = line.expected[0];
  if (found.kind !== 'told' || !found.isSignificant || terminal === undefined || against === undefined)
    return null;
  const { value, low, high } = found.susceptanceEither;
  const { voltageKv } = composition;
  return {
    terminal,
    against,
    ratioChange: found.changeAtLightLoad.re,
    angleChangeDeg: found.changeAtLightLoad.im * DEGREES,
    lightAmps: found.lightAmps,
    heavyAmps: found.heavyAmps,
    chargingAmps: { value: value * voltageKv, low: low * voltageKv, high: high * voltageKv },
  };
}
