import { newTerminalSchema, type NewTerminal, type RegisterLine } from '../contract/register';
import { amountCell, atColumns, cellReader, columnProblems, yesOrNo } from './cells';
import { guardedText } from './guarded-text';
import { judged } from './judged';
import type { RowRead } from './row-read';
import type { Cells } from './sheet';

/** A terminal as its row holds it: with the line it belongs to, and its place at a transformer in the zone. */
export interface TerminalEntry {
  readonly line: string;
  readonly terminal: NewTerminal;
  readonly behindTransformer: boolean;
}

const COLUMN_OF: Readonly<Record<string, string>> = {
  ...{ key: 'key', substation: 'substation', substationName: 'substation_name', inService: 'in_service' },
  ...{ ctPrimaryAmps: 'ct_primary_a', ctClass: 'ct_class' },
};

export function terminalCells({ line, terminal, behindTransformer }: TerminalEntry): Cells {
  return {
    ...{ line, key: terminal.key, substation: terminal.substation },
    substation_name: guardedText(terminal.substationName),
    ct_primary_a: amountCell(terminal.ctPrimaryAmps),
    ct_class: guardedText(terminal.ctClass),
    in_service: yesOrNo(terminal.inService),
    behind_transformer: yesOrNo(behindTransformer),
  };
}

export const terminalEntries = (line: RegisterLine): TerminalEntry[] =>
  line.terminals.map((terminal) => ({
    line: line.key,
    terminal,
    behindTransformer: line.inZoneTransformer?.otherTerminals.includes(terminal.key) ?? false,
  }));

export function terminalFromCells(cells: Cells): RowRead<TerminalEntry> {
  const cell = cellReader(cells);
  const parsed = judged(newTerminalSchema, {
    ...{ key: cell.text('key'), substation: cell.text('substation') },
    ...{ substationName: cell.text('substation_name'), ctPrimaryAmps: cell.figure('ct_primary_a') },
    ...{ ctClass: cell.text('ct_class'), inService: cell.yesOrNo('in_service') },
  });
  const behindTransformer = cell.yesOrNo('behind_transformer');
  const problems = columnProblems(cell.problems, parsed.ok ? [] : atColumns(parsed.problems, COLUMN_OF));
  if (problems.length > 0 || !parsed.ok) return { ok: false, problems };
  return { ok: true, value: { line: cell.text('line'), terminal: parsed.value, behindTransformer } };
}
