import { direction, minus, plus, scaled, squared, times, ZERO } from './complex';
import type { Complex } from './complex';
import { mismatchFrom } from './composition';
import { residualRmsAmps } from './composition-fit';
import {
  crossProduct,
  currentSquares,
  differentialSquares,
  normalProduct,
  regressorCount,
  shapeOf,
  snapshotCount,
} from './composition-sums';
import type { CompositionSums, SumsShape } from './composition-sums';

/** Voltage and currents at which a composition is looked at, phasors against one reference angle. */
export interface CompositionPoint {
  /** V̄, kilovolts rms; `undefined` for a line without voltages. */
  readonly voltageKv: Complex | undefined;
  /** Currents into the line of all terminals but the first, amperes rms, in the register's order. */
  readonly otherCurrentsAmps: readonly Complex[];
}

/**
 * The point of a line with two terminals at this through current, which flows in at the first and lags the
 * voltage by `powerFactorAngleRad` (of no use without a voltage). Angle reference: the voltage.
 */
export function twoTerminalPoint(load: {
  readonly voltageKv: number | undefined;
  readonly throughAmps: number;
  readonly powerFactorAngleRad: number;
}): CompositionPoint {
  const angle = Math.PI - load.powerFactorAngleRad;
  return {
    voltageKv: load.voltageKv === undefined ? undefined : { re: load.voltageKv, im: 0 },
    otherCurrentsAmps: [scaled({ re: Math.cos(angle), im: Math.sin(angle) }, load.throughAmps)],
  };
}

/**
 * The typical point of a window: rms of the voltage and of every current, each at its mean angle against the
 * reference terminal's current, which has angle 0. `undefined` without snapshots and without a reference current.
 */
export function typicalPoint(
  sums: CompositionSums,
  { referenceTerminal }: { readonly referenceTerminal: number } = {
    referenceTerminal: strongestTerminal(sums),
  },
): CompositionPoint | undefined {
  const reference = referenceProducts(sums, referenceTerminal);
  if (reference === undefined) return undefined;
  const count = snapshotCount(sums);
  const regressors = reference.products.map((product, i) =>
    scaled(direction(product) ?? ZERO, Math.sqrt(normalProduct(sums, i, i).re / count)),
  );
  return shapeOf(sums).hasVoltage
    ? { voltageKv: regressors[0], otherCurrentsAmps: regressors.slice(1) }
    : { voltageKv: undefined, otherCurrentsAmps: regressors };
}

/** The point with all its currents times a factor; the voltage stays. */
export function atLoad({ voltageKv, otherCurrentsAmps }: CompositionPoint, factor: number): CompositionPoint {
  return { voltageKv, otherCurrentsAmps: otherCurrentsAmps.map((current) => scaled(current, factor)) };
}

/**
 * Y·V̄ + Σ E_k·I_k, amperes against the point's reference. Throws where the point lacks what the coefficients
 * belong to.
 */
export function predictedDifferentialAmps(
  { shape, coefficients }: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] },
  point: CompositionPoint,
): Complex {
  const regressors = regressorsOf(shape, point);
  return plus(...coefficients.map((coefficient, i) => times(coefficient, regressors[i]!)));
}

function regressorsOf({ hasVoltage, terminalCount }: SumsShape, point: CompositionPoint): readonly Complex[] {
  const { voltageKv, otherCurrentsAmps } = point;
  if (otherCurrentsAmps.length !== terminalCount - 1 || (hasVoltage && voltageKv === undefined)) {
    throw new RangeError('An operating point has a current for every terminal but the first, and a voltage.');
  }
  return hasVoltage && voltageKv !== undefined ? [voltageKv, ...otherCurrentsAmps] : otherCurrentsAmps;
}

/**
 * A standing differential as phasors laid head to tail, amperes rms, referred to the reference terminal's
 * current at angle 0. They add up to `differentialAmps`.
 */
export interface CompositionPolygon {
  /** j·Im Y·V̄ */
  readonly chargingAmps: Complex;
  /** Re Y·V̄ */
  readonly leakageAmps: Complex;
  /** The part of every mismatch that Re e makes, summed over the terminals. */
  readonly ratioAmps: Complex;
  /** The part that Im e makes. */
  readonly angleAmps: Complex;
  /** What of the window's differential keeps its angle to the reference current and is none of these. */
  readonly restAmps: Complex;
  readonly differentialAmps: Complex;
  /** Rms of all that the coefficients leave over in the window; it has no angle, so it is in no polygon. */
  readonly restRmsAmps: number;
  readonly point: CompositionPoint;
}

/**
 * The polygon of a window (a day, say) under coefficients that may come from a longer one. The window's own
 * mean residue against the reference current is the rest. `undefined` without snapshots and without a reference
 * current. Throws for sums of another shape than the coefficients'.
 */
export function compositionPolygon(
  sums: CompositionSums,
  fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] },
  { referenceTerminal }: { readonly referenceTerminal: number } = {
    referenceTerminal: strongestTerminal(sums),
  },
): CompositionPolygon | undefined {
  const point = typicalPoint(sums, { referenceTerminal });
  const restAmps = meanResidueAmps(sums, fit.coefficients, { referenceTerminal });
  if (point === undefined || restAmps === undefined) return undefined;
  const parts = partsAt(fit, point);
  const { chargingAmps, leakageAmps, ratioAmps, angleAmps } = parts;
  return {
    ...parts,
    restAmps,
    differentialAmps: plus(chargingAmps, leakageAmps, ratioAmps, angleAmps, restAmps),
    restRmsAmps: residualRmsAmps(sums, fit.coefficients),
    point,
  };
}

/**
 * The parts of the predicted differential at a point, amperes. E·I = (Re e + j·Im e)·I/(1 + e): what Re e and
 * what Im e make of the current that the transformers would agree on.
 */
export function partsAt(
  fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] },
  point: CompositionPoint,
): Pick<CompositionPolygon, 'chargingAmps' | 'leakageAmps' | 'ratioAmps' | 'angleAmps'> {
  const regressors = regressorsOf(fit.shape, point);
  const from = fit.shape.hasVoltage ? 1 : 0;
  const admittance = from === 1 ? fit.coefficients[0]! : ZERO;
  const voltage = from === 1 ? regressors[0]! : ZERO;
  let ratioAmps = ZERO;
  let angleAmps = ZERO;
  fit.coefficients.slice(from).forEach((coefficient, index) => {
    const mismatch = mismatchFrom(coefficient);
    const agreed = times(minus({ re: 1, im: 0 }, coefficient), regressors[from + index]!);
    ratioAmps = plus(ratioAmps, scaled(agreed, mismatch.re));
    angleAmps = plus(angleAmps, times({ re: 0, im: mismatch.im }, agreed));
  });
  return {
    chargingAmps: times({ re: 0, im: admittance.im }, voltage),
    leakageAmps: scaled(voltage, admittance.re),
    ratioAmps,
    angleAmps,
  };
}

/**
 * Mean of D less what the coefficients make of it, against the reference terminal's current and at its rms,
 * amperes: Σ conj(I)·residue/√(n·Σ|I|²). `undefined` without snapshots and without a reference current.
 */
export function meanResidueAmps(
  sums: CompositionSums,
  coefficients: readonly Complex[],
  { referenceTerminal }: { readonly referenceTerminal: number } = {
    referenceTerminal: strongestTerminal(sums),
  },
): Complex | undefined {
  const reference = referenceProducts(sums, referenceTerminal);
  if (reference === undefined) return undefined;
  const explained = plus(...coefficients.map((each, i) => times(each, reference.products[i]!)));
  const residue = minus(reference.differential, explained);
  return scaled(residue, 1 / Math.sqrt(snapshotCount(sums) * reference.squares));
}

/** The place of the terminal with the greatest rms current, from 0. */
export function strongestTerminal(sums: CompositionSums): number {
  let strongest = 0;
  let most = currentSquares(sums, 0);
  for (let terminal = 1; terminal < shapeOf(sums).terminalCount; terminal++) {
    const squares = currentSquares(sums, terminal);
    // the two ends of a line differ by its own differential: no reason to change the reference
    if (squares > most * 1.2) [strongest, most] = [terminal, squares];
  }
  return strongest;
}

/** Σ conj(I)·x of every regressor, Σ conj(I)·D and Σ|I|² of one terminal's current I. */
interface ReferenceProducts {
  readonly products: readonly Complex[];
  readonly differential: Complex;
  readonly squares: number;
}

function referenceProducts(sums: CompositionSums, terminal: number): ReferenceProducts | undefined {
  const { hasVoltage, terminalCount } = shapeOf(sums);
  if (!(Number.isInteger(terminal) && terminal >= 0 && terminal < terminalCount)) {
    throw new RangeError(`The line has ${terminalCount} terminals and none at place ${terminal}.`);
  }
  const place = terminal - 1 + (hasVoltage ? 1 : 0);
  const reference =
    terminal === 0
      ? firstCurrent(sums)
      : {
          products: regressorPlaces(sums).map((column) => normalProduct(sums, place, column)),
          differential: crossProduct(sums, place),
          squares: normalProduct(sums, place, place).re,
        };
  return snapshotCount(sums) > 0 && reference.squares > 0 ? reference : undefined;
}

const regressorPlaces = (sums: CompositionSums): number[] =>
  Array.from({ length: regressorCount(sums) }, (_, i) => i);

/** The products of the first terminal's current, which is D less the others and so no regressor itself. */
function firstCurrent(sums: CompositionSums): ReferenceProducts {
  const from = shapeOf(sums).hasVoltage ? 1 : 0;
  const others = regressorPlaces(sums).slice(from);
  const conjugated = ({ re, im }: Complex): Complex => ({ re, im: -im });
  const products = regressorPlaces(sums).map((column) =>
    minus(
      conjugated(crossProduct(sums, column)),
      plus(...others.map((other) => normalProduct(sums, other, column))),
    ),
  );
  // Σ conj(I₁)·D = Σ|D|² − Σ_k Σ conj(I_k)·D
  const differential = minus(
    { re: differentialSquares(sums), im: 0 },
    plus(...others.map((other) => crossProduct(sums, other))),
  );
  return { products, differential, squares: currentSquares(sums, 0) };
}

/** |D| at the point, amperes rms. */
export function levelAtPointAmps(
  fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] },
  point: CompositionPoint,
): number {
  return Math.sqrt(squared(predictedDifferentialAmps(fit, point)));
}
