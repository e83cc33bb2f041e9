import type { ImportKind, ImportReport, ImportRow } from '../contract/register-import';

/** A report on a file in words. */

/** What a row of each file is called. */
const ROWS: Readonly<Record<ImportKind, readonly [string, string]>> = {
  lines: ['line', 'lines'],
  terminals: ['terminal', 'terminals'],
  settings: ['version of settings', 'versions of settings'],
};

const counted = (count: number, [one, many]: readonly [string, string]): string =>
  `${count} ${count === 1 ? one : many}`;

export interface ImportCounts {
  readonly added: number;
  readonly changed: number;
  readonly left: number;
}

export function importCounts(rows: readonly ImportRow[]): ImportCounts {
  const count = (outcome: ImportRow['outcome']) => rows.filter((row) => row.outcome === outcome).length;
  return { added: count('added'), changed: count('changed'), left: count('left') };
}

/** "2 lines would be added, 1 changed, 14 left as they are." */
export function countsSentence(kind: ImportKind, counts: ImportCounts, mood: 'would be' | 'were'): string {
  const { added, changed, left } = counts;
  const named = counted(added, ROWS[kind]);
  const verb = mood === 'were' && added === 1 ? 'was' : mood;
  return `${named} ${verb} added, ${changed} changed, ${left} left as ${added + changed + left === 1 ? 'it is' : 'they are'}.`;
}

/** The page's first sentence after a file was looked at. */
export function reportSentence({ kind, problems, rows }: ImportReport): string {
  if (problems.length > 0)
    return problems.length === 1
      ? 'The file has one problem. Nothing is written.'
      : `The file has ${problems.length} problems. Nothing is written.`;
  const { added, changed } = importCounts(rows);
  if (kind === null || added + changed === 0) return 'The register already holds all that the file says.';
  return `${counted(added + changed, ROWS[kind])} to write. Nothing is written yet.`;
}

/** "row 3", or the file where no row is to blame. */
export const rowText = (row: number): string => (row === 0 ? 'the file' : String(row));

export const writeText = (rows: readonly ImportRow[]): string => {
  const { added, changed } = importCounts(rows);
  return added + changed === 1 ? 'Write this one row' : `Write these ${added + changed} rows`;
};
