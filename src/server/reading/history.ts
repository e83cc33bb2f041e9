import type { Level, LevelList, Rung, Snapshot, SnapshotList } from '../../contract/lines';
import type { PhaseResult } from '../../contract/result';
import { obstacle } from '../../warnings/obstacle';
import { readCreep, readLevelFigures } from '../../store/levels';
import { unpackMeasurements } from '../../store/packing';
import { readRegisterLine, type RegisteredLine } from '../../store/register';
import { hasFlag } from '../../store/snapshot-flags';
import { readSnapshots, type SnapshotRow } from '../../store/snapshots';
import { terminalOnWire } from '../../view/terminal-on-wire';
import type { Site } from '../site';

export const SNAPSHOTS_A_READ = 10_000;

interface Window {
  readonly from: Date;
  readonly to: Date;
}

/** Raw rows of a line in a window; undefined when the register does not hold it. */
export async function readSnapshotList(
  site: Site,
  key: string,
  { from, to }: Window,
): Promise<SnapshotList | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const rows = await readSnapshots(site.store, line.id, { from, to, most: SNAPSHOTS_A_READ + 1 });
  const shown = rows.slice(0, SNAPSHOTS_A_READ);
  return {
    line: key,
    truncated: rows.length > shown.length,
    snapshots: shown.map((row) => snapshotOnWire(row, line)),
  };
}

/** Hour or day rows of a line in a window; undefined when the register does not hold it. */
export async function readLevelList(
  site: Site,
  key: string,
  { from, to, rung }: Window & { rung: Rung },
): Promise<LevelList | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const [rows, creep] = await Promise.all([
    readLevelFigures(site.store, rung, { lineIds: [line.id], from, to }),
    readCreep(site.store, [line.id]),
  ]);
  const levels: Level[] = rows.map(({ lineId: _lineId, ...row }) => ({
    ...row,
    start: row.start.toISOString(),
  }));
  return { line: key, rung, levels, creep: creep.get(line.id) ?? [] };
}

function snapshotOnWire(row: SnapshotRow, line: RegisteredLine): Snapshot {
  const sent = new Map(
    unpackMeasurements(row.phasors, row.at).map(({ terminalId, measurement }) => [terminalId, measurement]),
  );
  return {
    at: row.at.toISOString(),
    complete: !hasFlag(row.flags, 'incomplete'),
    reason: rowReason(row, line),
    phases: {
      a: phase(row.differentialAAmps, row.restraintAAmps, row.thresholdAAmps, row.utilisationA),
      b: phase(row.differentialBAmps, row.restraintBAmps, row.thresholdBAmps, row.utilisationB),
      c: phase(row.differentialCAmps, row.restraintCAmps, row.thresholdCAmps, row.utilisationC),
    },
    throughAmps: row.throughAmps,
    compensation: rowCompensation(row),
    settingsVersion: row.settingRecordId,
    terminals: line.terminals.map(({ key }) => terminalOnWire(key, sent.get(line.terminalIds.get(key)!))),
  };
}

const phase = (
  ...[differentialAmps, restraintAmps, thresholdAmps, utilisation]: (number | null)[]
): PhaseResult => ({
  differentialAmps: differentialAmps ?? null,
  restraintAmps: restraintAmps ?? null,
  thresholdAmps: thresholdAmps ?? null,
  utilisation: utilisation ?? null,
});

function rowCompensation({ flags }: SnapshotRow): Snapshot['compensation'] {
  if (hasFlag(flags, 'compensationFellBack')) return 'fallen back';
  return hasFlag(flags, 'chargingCompensated') ? 'applied' : 'none';
}

/** Why a raw row has no differential, as far as the row itself tells. */
function rowReason(row: SnapshotRow, line: RegisteredLine): string | null {
  if (row.differentialAAmps !== null) return null;
  if (hasFlag(row.flags, 'incomplete')) return 'A terminal sent nothing for this instant.';
  if (hasFlag(row.flags, 'validityInvalid')) return 'A terminal marked its measurement invalid.';
  return obstacle(line) ?? 'No settings were in force, or a terminal’s clock ran free, at this instant.';
}
