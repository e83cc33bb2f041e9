import type { Measurement } from '../../contract/feed';
import { PHASES, perPhase, type PerPhase } from '../../protection/phase';
import { type Phasor, scale, sum } from '../../protection/phasor';
import { throughAmps } from '../../protection/evaluation';
import { isOnLineSide } from '../../protection/winding-compensation';
import { addSnapshot, type CompositionSums, emptySums } from '../../standing/composition-sums';
import { unpackMeasurements } from '../../store/packing';
import type { SnapshotRow } from '../../store/snapshots';
import { type RosterLine, type SchemeVersion, versionInForce } from '../roster';
import { voltagePhasors, zoneCurrents } from '../zone-currents';

/**
 * The composition's sums over qualified raw rows, one a phase. Undefined for a line whose feed holds no phasors,
 * and where no row has every terminal that is expected now: what other terminals sent does not add to it.
 */
export function snapshotSums(
  line: RosterLine,
  rows: readonly SnapshotRow[],
): PerPhase<CompositionSums> | undefined {
  if (line.goesBy === 'reported' || line.expected.length < 2) return undefined;
  const snapshots = rows.flatMap((row) => phasorsOf(line, row) ?? []);
  if (snapshots.length === 0) return undefined;
  const hasVoltage = snapshots.some(({ voltages }) => voltages !== undefined);
  const shape = { terminalCount: line.expected.length, hasVoltage };
  const sums = perPhase(() => emptySums(shape));
  for (const { currents, voltages } of snapshots)
    for (const phase of PHASES)
      addSnapshot(sums[phase], {
        differentialAmps: sum(currents[phase]),
        voltageKv: voltages?.[phase],
        otherCurrentsAmps: currents[phase].slice(1),
        throughAmps: throughAmps(currents[phase]),
      });
  return sums;
}

interface SnapshotPhasors {
  /** on the line's side, with the charging still in them: it is one of the causes to be told */
  readonly currents: PerPhase<readonly Phasor[]>;
  readonly voltages: PerPhase<Phasor> | undefined;
}

function phasorsOf(line: RosterLine, row: SnapshotRow): SnapshotPhasors | undefined {
  const keys = new Map([...line.terminals.values()].map(({ id, key }) => [id, key]));
  const byTerminal = new Map<string, Measurement>();
  for (const { terminalId, measurement } of unpackMeasurements(row.phasors, row.at)) {
    const key = keys.get(terminalId);
    if (key !== undefined) byTerminal.set(key, measurement);
  }
  const sent = line.expected.flatMap((key) => byTerminal.get(key) ?? []);
  if (sent.length < line.expected.length || sent.some(({ current }) => current === undefined))
    return undefined;
  const version = versionInForce(line, row.at.getTime());
  const zone = version?.zone && { ...version.zone, charging: undefined };
  return { currents: zoneCurrents(sent, zone).phases, voltages: meanVoltages(sent, version) };
}

/** The mean of the valid voltages on the line itself: those behind a transformer are another voltage. */
function meanVoltages(
  sent: readonly Measurement[],
  version: SchemeVersion | undefined,
): PerPhase<Phasor> | undefined {
  const windings = version?.zone?.windings;
  const valid = sent.flatMap((measurement, index) => {
    const winding = windings?.[index];
    const isLine = winding === undefined || isOnLineSide(winding);
    return (isLine ? voltagePhasors(measurement) : undefined) ?? [];
  });
  if (valid.length === 0) return undefined;
  return perPhase((phase) => scale(sum(valid.map((voltages) => voltages[phase])), 1 / valid.length));
}
