import type { SnapshotRow } from '../store/snapshots';
import type { ComputedSnapshot } from './computed-snapshot';
import { packMeasurements } from '../store/packing';

/** The raw row of a computed snapshot; what can't be computed is null. */
export function snapshotRow({
  line,
  atMs,
  measurements,
  version,
  points,
  throughAmps,
  flags,
}: ComputedSnapshot): SnapshotRow {
  return {
    lineId: line.id,
    at: new Date(atMs),
    flags,
    differentialAAmps: points?.a.differentialAmps ?? null,
    differentialBAmps: points?.b.differentialAmps ?? null,
    differentialCAmps: points?.c.differentialAmps ?? null,
    restraintAAmps: points?.a.restraintAmps ?? null,
    restraintBAmps: points?.b.restraintAmps ?? null,
    restraintCAmps: points?.c.restraintAmps ?? null,
    thresholdAAmps: points?.a.thresholdAmps ?? null,
    thresholdBAmps: points?.b.thresholdAmps ?? null,
    thresholdCAmps: points?.c.thresholdAmps ?? null,
    utilisationA: points?.a.utilisation ?? null,
    utilisationB: points?.b.utilisation ?? null,
    utilisationC: points?.c.utilisation ?? null,
    throughAmps: throughAmps ?? null,
    settingRecordId: version?.id ?? null,
    phasors: packMeasurements(
      [...measurements].map(([key, measurement]) => ({
        terminalId: line.terminals.get(key)!.id,
        measurement,
      })),
    ),
  };
}
