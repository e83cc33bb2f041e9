import type { RegisterLine } from '../contract/register';
import { newLineProblems } from '../store/register-rules';
import { lineCells, lineFromCells } from './lines-sheet';
import { nothingPlanned, refuseRow, repeatedRow, rowOutcome, type RowsPlanned } from './row-plan';
import type { SheetRow } from './sheet';

export function plannedLines(rows: readonly SheetRow[], register: readonly RegisterLine[]): RowsPlanned {
  const planned = nothingPlanned();
  const seen = new Map<string, number>();
  for (const { row, cells } of rows) {
    const key = cells.key ?? '';
    const standing = register.find((line) => line.key === key);
    const read = lineFromCells(cells, standing);
    const repeated = repeatedRow(seen, key, row);
    if (repeated !== undefined) refuseRow(planned, row, [{ field: 'key', problem: repeated }]);
    if (!read.ok) {
      refuseRow(planned, row, read.problems);
      continue;
    }
    const { terminals: _terminals, settings: _settings, key: _key, ...facts } = read.value;
    if (standing === undefined) refuseRow(planned, row, newLineProblems(read.value));
    const outcome = rowOutcome(row, key, {
      standing: standing && lineCells(standing),
      meant: lineCells(read.value),
    });
    planned.rows.push(outcome);
    if (outcome.outcome === 'added') planned.changes.push({ kind: 'new line', entry: read.value });
    if (outcome.outcome === 'changed') planned.changes.push({ kind: 'line', key, patch: facts });
  }
  return planned;
}
