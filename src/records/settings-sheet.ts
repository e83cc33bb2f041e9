import { newSettingsVersionSchema, type NewSettingsVersion, type RegisterLine } from '../contract/register';
import type { CharacteristicOnWire, SettingsVersion } from '../contract/settings-version';
import { RESTRAINT_KINDS } from '../protection/scheme';
import { settingsProblems } from '../store/register-rules';
import { CHARACTERISTIC_KINDS } from '../view/register-scheme-typed';
import { amountCell, atColumns, cellReader, columnProblems, yesOrNo } from './cells';
import type { CellReader } from './cells';
import { ctErrorsCell, ctErrorsOf } from './ct-errors-cell';
import { guardedText } from './guarded-text';
import { judged } from './judged';
import type { RowRead } from './row-read';
import type { Cells } from './sheet';

type Kind = CharacteristicOnWire['kind'];

/** The columns that only some kinds of characteristic have. */
const COLUMNS_OF: Readonly<Record<Kind, readonly string[]>> = {
  'two-slope': ['pickup_a', 'slope1', 'knee_a', 'slope2', 'slope_start', 'factor'],
  adaptive: ['pickup_a', 'ct_errors', 'time_error_ms'],
  'alpha-plane': ['pickup_a', 'radius', 'angle_deg'],
  'phase-comparison': ['tolerance_deg', 'release_a'],
};
const KIND_COLUMNS = [...new Set(Object.values(COLUMNS_OF).flat())];
const SLOPE_STARTS = ['from-zero', 'from-pickup'] as const;

const COLUMN_OF: Readonly<Record<string, string>> = {
  ...{ validFrom: 'valid_from', note: 'note', chargingCompensation: 'charging_compensation' },
  ...{ 'characteristic.kind': 'kind', 'restraint.kind': 'restraint', 'restraint.factor': 'factor' },
  ...{ 'characteristic.pickupAmps': 'pickup_a', 'characteristic.kneeAmps': 'knee_a' },
  ...{ 'characteristic.slope1': 'slope1', 'characteristic.slope2': 'slope2' },
  ...{ 'characteristic.slopeStart': 'slope_start', 'characteristic.ctErrors': 'ct_errors' },
  ...{ 'characteristic.timeErrorMs': 'time_error_ms', 'characteristic.radius': 'radius' },
  ...{ 'characteristic.angleDeg': 'angle_deg', 'characteristic.toleranceDeg': 'tolerance_deg' },
  ...{ 'characteristic.releaseAmps': 'release_a', restraint: 'restraint' },
};

/** A version's row, with who recorded it and when if it stands in the register. Slopes and errors are ratios. */
export function settingsCells(
  line: string,
  version: NewSettingsVersion & Partial<Pick<SettingsVersion, 'recordedBy' | 'recordedAt'>>,
): Cells {
  const { characteristic, restraint } = version;
  return {
    ...{ line, valid_from: new Date(version.validFrom).toISOString(), kind: characteristic.kind },
    ...characteristicCells(characteristic),
    restraint: restraint.kind,
    ...(restraint.kind === 'scaled-sum' ? { factor: amountCell(restraint.factor) } : {}),
    charging_compensation: yesOrNo(version.chargingCompensation),
    // As a quoted cell is read back
    note: guardedText(version.note.replaceAll(/\r\n?/g, '\n')),
    ...{ recorded_by: guardedText(version.recordedBy ?? ''), recorded_at: version.recordedAt ?? '' },
  };
}

function characteristicCells(characteristic: CharacteristicOnWire): Cells {
  switch (characteristic.kind) {
    case 'two-slope':
      return {
        ...{ pickup_a: amountCell(characteristic.pickupAmps), knee_a: amountCell(characteristic.kneeAmps) },
        ...{ slope1: amountCell(characteristic.slope1), slope2: amountCell(characteristic.slope2) },
        slope_start: characteristic.slopeStart,
      };
    case 'adaptive':
      return {
        pickup_a: amountCell(characteristic.pickupAmps),
        ct_errors: ctErrorsCell(characteristic.ctErrors),
        time_error_ms: amountCell(characteristic.timeErrorMs),
      };
    case 'alpha-plane':
      return {
        ...{ pickup_a: amountCell(characteristic.pickupAmps), radius: amountCell(characteristic.radius) },
        angle_deg: amountCell(characteristic.angleDeg),
      };
    case 'phase-comparison':
      return {
        tolerance_deg: amountCell(characteristic.toleranceDeg),
        release_a: amountCell(characteristic.releaseAmps),
      };
  }
}

/** A version from its row, judged on the line that it is for. */
export function settingsFromCells(cells: Cells, line: RegisterLine): RowRead<NewSettingsVersion> {
  const cell = cellReader(cells);
  const kind = cell.oneOf('kind', CHARACTERISTIC_KINDS);
  if (kind === undefined) return { ok: false, problems: cell.problems };
  const parsed = judged(newSettingsVersionSchema, {
    validFrom: cell.instant('valid_from'),
    characteristic: characteristicOf(kind, cell, cells),
    restraint: restraintOf(kind, cell),
    chargingCompensation: cell.yesOrNo('charging_compensation'),
    note: cell.text('note'),
  });
  const place = { ...line, terminals: line.terminals.map(({ key }) => key) };
  const problems = columnProblems(
    cell.problems,
    strangeCells(kind, cells),
    atColumns(parsed.ok ? settingsProblems(parsed.value, place) : parsed.problems, COLUMN_OF),
  );
  return problems.length === 0 && parsed.ok ? { ok: true, value: parsed.value } : { ok: false, problems };
}

function characteristicOf(kind: Kind, cell: CellReader, cells: Cells): Record<string, unknown> {
  switch (kind) {
    case 'two-slope':
      return {
        ...{ kind, pickupAmps: cell.figure('pickup_a'), slope1: cell.figure('slope1') },
        ...{ kneeAmps: cell.figure('knee_a'), slope2: cell.figure('slope2') },
        slopeStart: cell.oneOf('slope_start', SLOPE_STARTS),
      };
    case 'adaptive': {
      const ctErrors = ctErrorsOf(cells.ct_errors ?? '');
      if (!ctErrors.ok) cell.problems.push({ field: 'ct_errors', problem: ctErrors.problem });
      return {
        ...{ kind, pickupAmps: cell.figure('pickup_a'), timeErrorMs: cell.figure('time_error_ms') },
        ctErrors: ctErrors.ok ? ctErrors.value : [],
      };
    }
    case 'alpha-plane':
      return {
        ...{ kind, pickupAmps: cell.figure('pickup_a'), radius: cell.figure('radius') },
        angleDeg: cell.figure('angle_deg'),
      };
    case 'phase-comparison':
      return { kind, toleranceDeg: cell.figure('tolerance_deg'), releaseAmps: cell.figure('release_a') };
  }
}

function restraintOf(kind: Kind, cell: CellReader): Record<string, unknown> {
  const restraint = cell.oneOf('restraint', RESTRAINT_KINDS[kind]);
  return restraint === 'scaled-sum'
    ? { kind: restraint, factor: cell.figure('factor') }
    : { kind: restraint ?? 'none' };
}

/** A figure that its kind does not have would be lost without a word. */
function strangeCells(kind: Kind, cells: Cells): { field: string; problem: string }[] {
  const own = COLUMNS_OF[kind];
  return KIND_COLUMNS.filter((column) => !own.includes(column) && (cells[column] ?? '') !== '').map(
    (field) => ({ field, problem: `A characteristic of the kind ${kind} has no ${field}; leave it empty.` }),
  );
}
