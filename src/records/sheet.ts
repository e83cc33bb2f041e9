import { IMPORT_KINDS, type ImportKind, type RowProblem } from '../contract/register-import';
import { csvText, parseCsv } from './csv';

/** The columns of the three files, in the order of their export. */
export const COLUMNS: Readonly<Record<ImportKind, readonly string[]>> = {
  lines: [
    ...['key', 'name', 'voltage_kv', 'rating_a', 'emergency_rating_a', 'length_km', 'kind'],
    ...['capacitance_nf_per_km', 'least_internal_fault_a', 'goes_by', 'in_service', 'series_compensated'],
    ...['owner', 'transformer_other_kv', 'transformer_clock_number'],
    ...['transformer_zero_sequence_line', 'transformer_zero_sequence_other'],
  ],
  terminals: [
    ...['line', 'key', 'substation', 'substation_name', 'ct_primary_a', 'ct_class', 'in_service'],
    'behind_transformer',
  ],
  settings: [
    ...['line', 'valid_from', 'kind', 'pickup_a', 'slope1', 'knee_a', 'slope2', 'slope_start', 'restraint'],
    ...['factor', 'ct_errors', 'time_error_ms', 'radius', 'angle_deg', 'tolerance_deg', 'release_a'],
    ...['charging_compensation', 'note', 'recorded_by', 'recorded_at'],
  ],
};

/** Exported for whoever reads the file; the register writes its own when a version is recorded. */
const WRITTEN_ONLY: readonly string[] = ['recorded_by', 'recorded_at'];

/** A file from before there was such a column leaves what it would hold as it is. */
const MAY_BE_MISSING: readonly string[] = [...WRITTEN_ONLY, 'owner'];

export type Cells = Readonly<Record<string, string>>;
export interface SheetRow {
  readonly row: number;
  readonly cells: Cells;
}
export interface Sheet {
  readonly kind: ImportKind | null;
  readonly rows: readonly SheetRow[];
  readonly problems: readonly RowProblem[];
}

/** The cells of a file by column. Rows of the wrong length are named and left out. */
export function readSheet(text: string): Sheet {
  const read = parseCsv(text);
  if (!read.ok) return { kind: null, rows: [], problems: [{ ...rowOf(read.row), problem: read.problem }] };
  const [header = [], ...records] = read.records;
  const names = header.map((name) => name.trim().toLowerCase());
  const kind = kindOf(names);
  if (kind === null) return { kind, rows: [], problems: [{ ...rowOf(1), problem: NO_SUCH_HEADER }] };
  const problems = headerProblems(names, COLUMNS[kind]);
  const rows: SheetRow[] = [];
  for (const [index, record] of records.entries()) {
    const row = index + 2;
    if (record.every((cell) => cell.trim() === '')) continue;
    if (record.length !== names.length)
      problems.push({
        ...rowOf(row),
        problem: `This row has ${record.length} cells, and the header has ${names.length}.`,
      });
    else rows.push({ row, cells: Object.fromEntries(names.map((name, at) => [name, record[at]!.trim()])) });
  }
  if (records.length === 0) problems.push({ ...rowOf(1), problem: 'The file has a header and no rows.' });
  return { kind, rows, problems };
}

/** A file of one kind: its header and a row for each set of cells. */
export function sheetText(kind: ImportKind, rows: readonly Cells[]): string {
  const columns = COLUMNS[kind];
  return csvText([columns, ...rows.map((cells) => columns.map((column) => cells[column] ?? ''))]);
}

/** A problem that is no single cell's. */
const rowOf = (row: number) => ({ row, field: '' });

const NO_SUCH_HEADER = `The first row is the header of none of the three files. ${IMPORT_KINDS.map(
  (kind) => `${kind}: ${COLUMNS[kind].join(', ')}`,
).join('. ')}.`;

/** The kind whose columns are most nearly all there; null when not even half of any kind's are. */
function kindOf(names: readonly string[]): ImportKind | null {
  const share = (kind: ImportKind) =>
    COLUMNS[kind].filter((column) => names.includes(column)).length / COLUMNS[kind].length;
  const best = [...IMPORT_KINDS].sort((one, other) => share(other) - share(one))[0]!;
  return share(best) >= 0.5 ? best : null;
}

function headerProblems(names: readonly string[], columns: readonly string[]): RowProblem[] {
  const missing = columns.filter((column) => !names.includes(column) && !MAY_BE_MISSING.includes(column));
  const unknown = names.filter((name) => !columns.includes(name));
  const twice = names.filter((name, at) => names.indexOf(name) < at);
  const at = (field: string, problem: string) => ({ row: 1, field, problem });
  return [
    ...missing.map((column) => at(column, `The column ${column} is missing.`)),
    ...unknown.map((name) => at(name, name === '' ? 'A column has no name.' : `There is no column ${name}.`)),
    ...twice.map((name) => at(name, `The column ${name} is there twice.`)),
  ];
}
