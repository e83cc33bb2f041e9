import type { RegisterLine } from '../contract/register';
import type { ImportKind, RowProblem } from '../contract/register-import';
import type { PlannedImport } from '../store/register-import';
import { plannedLines } from './lines-plan';
import { plannedSettings } from './settings-plan';
import { COLUMNS, readSheet } from './sheet';
import { plannedTerminals } from './terminals-plan';

/** What a file means for the register as it stands: what each row would do, or all that is wrong, by row and column. */
export function registerPlan(text: string, register: readonly RegisterLine[]): PlannedImport {
  const { kind, rows, problems } = readSheet(text);
  if (kind === null) return { kind, rows: [], problems, changes: [] };
  // Without all its columns no row of a file can be judged
  if (problems.some(({ row }) => row === 1)) return { kind, rows: [], problems, changes: [] };
  const planned = PLANS[kind](rows, register);
  return { kind, ...planned, problems: inSheetOrder(kind, [...problems, ...planned.problems]) };
}

const PLANS = { lines: plannedLines, terminals: plannedTerminals, settings: plannedSettings };

/** As a reader goes through the file: row by row, and in each from left to right. */
function inSheetOrder(kind: ImportKind, problems: readonly RowProblem[]): RowProblem[] {
  const place = ({ field }: RowProblem) => COLUMNS[kind].indexOf(field);
  return problems.toSorted((one, other) => one.row - other.row || place(one) - place(other));
}
