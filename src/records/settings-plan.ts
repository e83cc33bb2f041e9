import type { RegisterLine } from '../contract/register';
import { nothingPlanned, refuseRow, repeatedRow, rowOutcome, type RowsPlanned } from './row-plan';
import { settingsCells, settingsFromCells } from './settings-sheet';
import type { SheetRow } from './sheet';
import { noLine } from './terminals-plan';

const OTHER_VERSION =
  'This line already has other settings that are valid from this instant, and what is recorded is not rewritten. Give another instant.';

export function plannedSettings(rows: readonly SheetRow[], register: readonly RegisterLine[]): RowsPlanned {
  const planned = nothingPlanned();
  const seen = new Map<string, number>();
  for (const { row, cells } of rows) {
    const line = register.find(({ key }) => key === cells.line);
    if (line === undefined) {
      refuseRow(planned, row, [noLine(cells.line ?? '')]);
      continue;
    }
    const read = settingsFromCells(cells, line);
    if (!read.ok) {
      refuseRow(planned, row, read.problems);
      continue;
    }
    const version = read.value;
    const atMs = Date.parse(version.validFrom);
    const subject = `${line.key}, from ${new Date(atMs).toISOString()}`;
    const standing = line.settings.find(({ validFrom }) => Date.parse(validFrom) === atMs);
    const outcome = rowOutcome(row, subject, {
      standing: standing && schemeCells(line.key, standing),
      meant: schemeCells(line.key, version),
    });
    const repeated = repeatedRow(seen, subject, row);
    if (repeated !== undefined) refuseRow(planned, row, [{ field: 'valid_from', problem: repeated }]);
    if (outcome.outcome === 'changed')
      refuseRow(planned, row, [{ field: 'valid_from', problem: OTHER_VERSION }]);
    else planned.rows.push(outcome);
    if (outcome.outcome === 'added') planned.changes.push({ kind: 'settings', key: line.key, version });
  }
  return planned;
}

/** A version's cells without who recorded it and when, which a file cannot say. */
function schemeCells(line: string, version: Parameters<typeof settingsCells>[1]) {
  const { recorded_by: _by, recorded_at: _at, ...cells } = settingsCells(line, version);
  return cells;
}
