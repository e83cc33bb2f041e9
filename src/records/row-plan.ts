import type { Problem } from '../contract/problem';
import type { ImportRow, RowProblem } from '../contract/register-import';
import type { PlannedChange } from '../store/register-import';
import type { Cells } from './sheet';

/** What the rows of a file would do, as it is gathered row by row. */
export interface RowsPlanned {
  readonly rows: ImportRow[];
  readonly problems: RowProblem[];
  readonly changes: PlannedChange[];
}

export const nothingPlanned = (): RowsPlanned => ({ rows: [], problems: [], changes: [] });

export function refuseRow(planned: RowsPlanned, row: number, problems: Problem['fields']): void {
  planned.problems.push(...problems.map((found) => ({ row, ...found })));
}

/** What a row does, by how its cells differ from those of what stands. */
export function rowOutcome(
  row: number,
  subject: string,
  { standing, meant }: { standing: Cells | undefined; meant: Cells },
): ImportRow {
  if (standing === undefined) return { row, subject, outcome: 'added', fields: [] };
  const fields = Object.keys(meant).filter((column) => (standing[column] ?? '') !== (meant[column] ?? ''));
  return { row, subject, outcome: fields.length === 0 ? 'left' : 'changed', fields };
}

/** Names the row in which a file has already said something of the same subject. */
export function repeatedRow(seen: Map<string, number>, subject: string, row: number): string | undefined {
  const before = seen.get(subject);
  if (before === undefined) seen.set(subject, row);
  return before === undefined ? undefined : `Row ${before} of this file has the same.`;
}
