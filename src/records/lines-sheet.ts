import { LINE_KINDS, newLineSchema, type NewLine, type RegisterLine } from '../contract/register';
import { amountCell, atColumns, cellReader, columnProblems, yesOrNo } from './cells';
import type { CellReader } from './cells';
import { guardedText } from './guarded-text';
import { judged } from './judged';
import type { RowRead } from './row-read';
import type { Cells } from './sheet';

type LineFacts = Omit<RegisterLine, 'terminals' | 'settings'>;

const ZERO_SEQUENCE = ['removed', 'kept'] as const;
const GOES_BY = ['phasors', 'reported'] as const;

const COLUMN_OF: Readonly<Record<string, string>> = {
  ...{ key: 'key', name: 'name', voltageKv: 'voltage_kv', ratingAmps: 'rating_a', lengthKm: 'length_km' },
  ...{ emergencyRatingAmps: 'emergency_rating_a', kind: 'kind', goesBy: 'goes_by' },
  ...{ capacitanceNfPerKm: 'capacitance_nf_per_km', leastInternalFaultAmps: 'least_internal_fault_a' },
  owner: 'owner',
  ...{ inService: 'in_service', seriesCompensated: 'series_compensated' },
  'inZoneTransformer.otherVoltageKv': 'transformer_other_kv',
  'inZoneTransformer.clockNumber': 'transformer_clock_number',
};

export function lineCells(line: LineFacts): Cells {
  const transformer = line.inZoneTransformer;
  const zero = (isRemoved: boolean | undefined) =>
    isRemoved === undefined ? '' : isRemoved ? 'removed' : 'kept';
  return {
    ...{ key: line.key, name: guardedText(line.name), kind: line.kind, goes_by: line.goesBy },
    ...{ voltage_kv: amountCell(line.voltageKv), length_km: amountCell(line.lengthKm) },
    ...{ rating_a: amountCell(line.ratingAmps), emergency_rating_a: amountCell(line.emergencyRatingAmps) },
    capacitance_nf_per_km: amountCell(line.capacitanceNfPerKm),
    least_internal_fault_a: amountCell(line.leastInternalFaultAmps),
    owner: guardedText(line.owner ?? ''),
    ...{ in_service: yesOrNo(line.inService), series_compensated: yesOrNo(line.seriesCompensated) },
    transformer_other_kv: amountCell(transformer?.otherVoltageKv),
    transformer_clock_number: amountCell(transformer?.clockNumber),
    transformer_zero_sequence_line: zero(transformer?.removesZeroSequence.line),
    transformer_zero_sequence_other: zero(transformer?.removesZeroSequence.other),
  };
}

/** A line from its row. The terminals behind its transformer stand in the file of terminals: here they stay as they are. */
export function lineFromCells(cells: Cells, standing: RegisterLine | undefined): RowRead<NewLine> {
  const cell = cellReader(cells);
  const value = {
    ...{ key: cell.text('key'), name: cell.text('name'), voltageKv: cell.figure('voltage_kv') },
    owner: cells.owner === undefined ? (standing?.owner ?? null) : cell.text('owner') || null,
    ...{ ratingAmps: cell.figure('rating_a'), emergencyRatingAmps: cell.figure('emergency_rating_a') },
    ...{ lengthKm: cell.figure('length_km'), kind: cell.oneOf('kind', LINE_KINDS) },
    capacitanceNfPerKm: cell.amount('capacitance_nf_per_km') ?? null,
    leastInternalFaultAmps: cell.amount('least_internal_fault_a') ?? null,
    ...{ goesBy: cell.oneOf('goes_by', GOES_BY), inService: cell.yesOrNo('in_service') },
    seriesCompensated: cell.yesOrNo('series_compensated'),
    inZoneTransformer: transformerFromCells(cell, cells, standing),
  };
  const parsed = judged(newLineSchema, value);
  const problems = columnProblems(cell.problems, parsed.ok ? [] : atColumns(parsed.problems, COLUMN_OF));
  return problems.length === 0 && parsed.ok ? { ok: true, value: parsed.value } : { ok: false, problems };
}

function transformerFromCells(
  cell: CellReader,
  cells: Cells,
  standing: RegisterLine | undefined,
): Record<string, unknown> | null {
  const columns = Object.keys(cells).filter((column) => column.startsWith('transformer_'));
  if (columns.every((column) => cells[column] === '')) return null;
  return {
    otherVoltageKv: cell.figure('transformer_other_kv'),
    clockNumber: cell.figure('transformer_clock_number'),
    otherTerminals: standing?.inZoneTransformer?.otherTerminals ?? [],
    removesZeroSequence: {
      line: cell.oneOf('transformer_zero_sequence_line', ZERO_SEQUENCE) === 'removed',
      other: cell.oneOf('transformer_zero_sequence_other', ZERO_SEQUENCE) === 'removed',
    },
  };
}
