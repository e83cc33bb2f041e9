import type { Problem } from '../contract/problem';
import type { RegisterLine } from '../contract/register';
import { SEVENTH_TERMINAL, TERMINALS_MOST, transformerProblems } from '../store/register-rules';
import { nothingPlanned, refuseRow, repeatedRow, rowOutcome, type RowsPlanned } from './row-plan';
import type { SheetRow } from './sheet';
import { terminalCells, terminalEntries, terminalFromCells, type TerminalEntry } from './terminals-sheet';

/** The register as the rows so far would leave it: what a later row is judged by. */
interface Afterwards {
  readonly substations: Map<string, string>;
  /** terminals of each line with their place at its transformer, and the last row that spoke of it */
  readonly lines: Map<string, { terminals: Map<string, boolean>; row: number | undefined }>;
}

export function plannedTerminals(rows: readonly SheetRow[], register: readonly RegisterLine[]): RowsPlanned {
  const planned = nothingPlanned();
  const seen = new Map<string, number>();
  const afterwards = standingRegister(register);
  for (const { row, cells } of rows) {
    const subject = `${cells.line}/${cells.key}`;
    const line = register.find(({ key }) => key === cells.line);
    const repeated = repeatedRow(seen, subject, row);
    if (line === undefined) refuseRow(planned, row, [noLine(cells.line ?? '')]);
    if (repeated !== undefined) refuseRow(planned, row, [{ field: 'key', problem: repeated }]);
    const read = terminalFromCells(cells);
    if (!read.ok) refuseRow(planned, row, read.problems);
    if (read.ok && line !== undefined) planTerminal(planned, afterwards, { row, entry: read.value, line });
  }
  for (const line of register) planTransformer(planned, afterwards, line);
  return planned;
}

export const noLine = (key: string): Problem['fields'][number] => ({
  field: 'line',
  problem:
    key === '' ? 'Give the key of a line.' : `The register has no line ${key}; import the lines first.`,
});

function standingRegister(register: readonly RegisterLine[]): Afterwards {
  const entries = register.flatMap(terminalEntries);
  return {
    substations: new Map(
      entries.map(({ terminal }) => [terminal.substation, terminal.substationName] as const),
    ),
    lines: new Map(
      register.map((line) => [
        line.key,
        {
          terminals: new Map(terminalEntries(line).map((one) => [one.terminal.key, one.behindTransformer])),
          row: undefined,
        },
      ]),
    ),
  };
}

function planTerminal(
  planned: RowsPlanned,
  { substations, lines }: Afterwards,
  { row, entry, line }: { row: number; entry: TerminalEntry; line: RegisterLine },
): void {
  const { terminal, behindTransformer } = entry;
  const after = lines.get(line.key)!;
  const name = substations.get(terminal.substation);
  const standing = terminalEntries(line).find((one) => one.terminal.key === terminal.key);
  after.terminals.set(terminal.key, behindTransformer);
  after.row = row;
  substations.set(terminal.substation, name ?? terminal.substationName);
  const outcome = rowOutcome(row, `${line.key}/${terminal.key}`, {
    standing: standing && terminalCells(standing),
    meant: terminalCells(entry),
  });
  planned.rows.push(outcome);
  refuseRow(planned, row, [
    ...(name !== undefined && name !== terminal.substationName
      ? [{ field: 'substation_name', problem: `The key ${terminal.substation} belongs to ${name}.` }]
      : []),
    ...(after.terminals.size > TERMINALS_MOST ? [{ field: 'line', problem: SEVENTH_TERMINAL }] : []),
    ...(behindTransformer && line.inZoneTransformer === null
      ? [{ field: 'behind_transformer', problem: 'This line has no transformer inside its zone.' }]
      : []),
  ]);
  const { key: terminalKey, ...patch } = terminal;
  if (outcome.outcome === 'added')
    planned.changes.push({ kind: 'new terminal', key: line.key, entry: terminal });
  if (outcome.outcome === 'changed')
    planned.changes.push({ kind: 'terminal', key: line.key, terminalKey, patch });
}

/** A terminal's place at the transformer is kept with the line: one change for all of its rows, after them. */
function planTransformer(planned: RowsPlanned, { lines }: Afterwards, line: RegisterLine): void {
  const { terminals, row } = lines.get(line.key)!;
  const transformer = line.inZoneTransformer;
  if (row === undefined || transformer === null) return;
  const otherTerminals = [...terminals].filter(([, isBehind]) => isBehind).map(([key]) => key);
  const inZoneTransformer = { ...transformer, otherTerminals };
  const problems = transformerProblems(inZoneTransformer, [...terminals.keys()]);
  refuseRow(
    planned,
    row,
    problems.map(({ problem }) => ({ field: 'behind_transformer', problem })),
  );
  const isSame = otherTerminals.toSorted().join() === transformer.otherTerminals.toSorted().join();
  if (!isSame) planned.changes.push({ kind: 'line', key: line.key, patch: { inZoneTransformer } });
}
