import type { RegisterLine } from '../contract/register';
import type { RowProblem } from '../contract/register-import';
import type { PlannedImport } from '../store/register-import';
import { plannedLines } from './lines-plan';
import { plannedSettings } from './settings-plan';
import { readSheet } from './sheet';
import { plannedTerminals } from './terminals-plan';

/** What a file means for the register as it stands: what each row would do, or all that is wrong, by row and column. */
export function registerPlan(text: string, register: readonly RegisterLine[]): PlannedImport {
  const { kind, rows, problems } = readSheet(text);
  if (kind === null) return { kind, rows: [], problems, changes: [] };
  // Without all its columns no row of a file can be judged
  if (problems.some(({ row }) => row === 1)) return { kind, rows: [], problems, changes: [] };
  const planned = PLANS[kind](rows, register);
  return { kind, ...planned, problems: [...problems, ...planned.problems].sort(byRow) };
}

const PLANS = { lines: plannedLines, terminals: plannedTerminals, settings: plannedSettings };
const byRow = (one: RowProblem, other: RowProblem): number => one.row - other.row;
