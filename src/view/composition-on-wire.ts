import type { CompositionOnWire, EstimateOnWire, PolygonOnWire } from '../contract/composition';
import type { RegisterLine } from '../contract/register';
import { expectedTerminals } from '../contract/expected-terminals';
import { CT_CLASSES, ctClassNamed, type CtClass } from '../protection/ct-class';
import type { Complex } from '../standing/complex';
import {
  againstBudget,
  type Composition,
  type SeparatedComposition,
  type TerminalMismatch,
} from '../standing/composition';
import { type CompositionSums, snapshotCount, totalOf } from '../standing/composition-sums';
import { compositionPolygon } from '../standing/operating-point';
import { lineSusceptanceMillisiemens } from './line-zone';
import { separabilityWords } from './separability-words';

/** The window that a composition was taken over, and the day rows it was taken from. */
export interface ComposedWindow {
  readonly from: string;
  readonly to: string;
  readonly sums: readonly CompositionSums[];
}

type ComposedLine = Pick<RegisterLine, 'goesBy' | 'terminals' | 'capacitanceNfPerKm' | 'lengthKm'>;

const DEGREES = 180 / Math.PI;
const NO_VOLTAGE =
  'This feed carries no voltage, so charging can’t be told from the transformers’ mismatch. Voltages in the feed would tell.';

/** A composition as it is published: terminals by their keys, angles in degrees, and against the line's register. */
export function compositionOnWire(
  composition: Composition,
  window: ComposedWindow,
  {
    line,
    frequencyHz,
    compensatedMillisiemens,
  }: { line: ComposedLine; frequencyHz: number; compensatedMillisiemens: number },
): CompositionOnWire {
  const counted = {
    from: window.from,
    to: window.to,
    days: composition.days,
    snapshotCount: window.sums.reduce((total, sums) => total + snapshotCount(sums), 0),
  };
  if (composition.kind === 'not separable')
    return {
      kind: 'not separable',
      ...counted,
      reason: separabilityWords(composition.reason, terminalNames(line)),
    };
  const {
    susceptanceMillisiemens: susceptance,
    conductanceMillisiemens: conductance,
    voltageKv,
  } = composition;
  if (susceptance === undefined || conductance === undefined)
    return { kind: 'not separable', ...counted, reason: NO_VOLTAGE };
  const constant = lineSusceptanceMillisiemens(line, frequencyHz);
  // under a scheme that compensates, what is left of the charging is expected to be nothing
  const expected = constant === undefined ? undefined : constant - compensatedMillisiemens;
  return {
    kind: 'separated',
    ...counted,
    polygon: polygonOnWire(composition, window.sums),
    chargingAmps: currentOf(susceptance, voltageKv),
    expectedChargingAmps: expected === undefined || voltageKv === undefined ? null : expected * voltageKv,
    leakageAmps: currentOf(conductance, voltageKv),
    admittance: {
      leftMillisiemens: [conductance.value, susceptance.value],
      compensatedMillisiemens,
    },
    mismatches: composition.mismatches.map((mismatch) => mismatchOnWire(mismatch, line)),
    residualRmsAmps: composition.residualRmsAmps,
    condition: composition.condition,
  };
}

function polygonOnWire(
  composition: SeparatedComposition,
  sums: readonly CompositionSums[],
): PolygonOnWire | null {
  const total = totalOf(sums);
  const polygon = total && compositionPolygon(total, composition);
  if (polygon === undefined) return null;
  return {
    chargingAmps: pair(polygon.chargingAmps),
    leakageAmps: pair(polygon.leakageAmps),
    ratioAmps: pair(polygon.ratioAmps),
    angleAmps: pair(polygon.angleAmps),
    restAmps: pair(polygon.restAmps),
    differentialAmps: pair(polygon.differentialAmps),
  };
}

const pair = ({ re, im }: Complex): [number, number] => [re, im];

function currentOf(
  admittance: EstimateOnWire | undefined,
  voltageKv: number | undefined,
): EstimateOnWire | null {
  if (admittance === undefined || voltageKv === undefined) return null;
  return scaled(admittance, voltageKv);
}

const scaled = ({ value, low, high }: EstimateOnWire, factor: number): EstimateOnWire => ({
  value: value * factor,
  low: low * factor,
  high: high * factor,
});

function mismatchOnWire(mismatch: TerminalMismatch, line: ComposedLine) {
  const keys = expectedTerminals(line);
  const [first, own] = [keys[0], keys[mismatch.terminal]].map((key) => classOf(line, key));
  const ratioBudget = first && own ? first.ratioError + own.ratioError : undefined;
  const angleBudget =
    first?.displacementLimitRad === undefined || own?.displacementLimitRad === undefined
      ? undefined
      : first.displacementLimitRad + own.displacementLimitRad;
  return {
    terminal: keys[mismatch.terminal] ?? '',
    against: keys[0] ?? '',
    ratio: mismatch.ratio,
    ratioBudget: ratioBudget === undefined ? null : againstBudget(mismatch.ratio, ratioBudget),
    angleDeg: scaled(mismatch.angleRad, DEGREES),
    angleBudget: angleBudget === undefined ? null : againstBudget(mismatch.angleRad, angleBudget),
    asymmetryMs: mismatch.asymmetryMs,
  };
}

function classOf({ terminals }: ComposedLine, key: string | undefined): CtClass | undefined {
  const name = ctClassNamed(terminals.find((terminal) => terminal.key === key)?.ctClass ?? '');
  return name === undefined ? undefined : CT_CLASSES[name];
}

const terminalNames = (line: ComposedLine): string[] =>
  expectedTerminals(line).map(
    (key) => line.terminals.find((terminal) => terminal.key === key)?.substationName ?? key,
  );
