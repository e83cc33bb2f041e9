import { expectedTerminals } from '../../contract/expected-terminals';
import type { RegisterLine } from '../../contract/register';
import { classBudget, CT_CLASSES, ctClassNamed } from '../../protection/ct-class';
import { isComputable } from '../../protection/evaluation';
import { expectedStanding } from '../../protection/expected-standing';
import { measuredModel } from '../../protection/line-model';
import { worstPoint } from '../../protection/loadability';
import type { Complex } from '../../standing/complex';
import type { SumsShape } from '../../standing/composition-sums';
import { lineSusceptanceMillisiemens } from '../../view/line-zone';
import type { SchemeVersion } from '../roster';

/** Power-factor angles that a prediction for emergency rating ranges over, either way of the power. */
const LAG_RAD_MOST = Math.PI / 6;

/**
 * What gives the utilisation of one phase at emergency rating by the coefficients of a composition of this shape;
 * undefined where it can't be told.
 */
export function emergencyUtilisationOf(
  line: RegisterLine,
  { scheme, conditions }: SchemeVersion,
  { hasVoltage, terminalCount }: SumsShape,
): ((coefficients: readonly Complex[]) => number | undefined) | undefined {
  if (!hasVoltage) return undefined;
  const range = {
    frequencyHz: conditions.frequencyHz,
    lagRadLeast: -LAG_RAD_MOST,
    lagRadMost: LAG_RAD_MOST,
  };
  // what the scheme compensates is out of these sums already
  const underLoad = { terminalCount, voltageKv: line.voltageKv, compensatedMillisiemens: 0 };
  return ([admittance, ...mismatches]) => {
    const model = measuredModel(underLoad, { admittanceMillisiemens: admittance!, mismatches });
    const found = worstPoint({ scheme, model, range }, line.emergencyRatingAmps);
    return isComputable(found) ? found.utilisation : undefined;
  };
}

/** The standing level to be expected by charging and the transformers' classes, taken as independent. */
export function expectedLevelAmps(
  line: RegisterLine,
  {
    throughAmps,
    isCompensated,
    frequencyHz,
  }: { throughAmps: number; isCompensated: boolean; frequencyHz: number },
): number | undefined {
  const susceptance = lineSusceptanceMillisiemens(line, frequencyHz);
  const charging = susceptance === undefined ? undefined : (susceptance * line.voltageKv) / Math.sqrt(3);
  const names = expectedTerminals(line).map((key) =>
    ctClassNamed(line.terminals.find((terminal) => terminal.key === key)?.ctClass ?? ''),
  );
  const classes = names.flatMap((name) => (name === undefined ? [] : [CT_CLASSES[name]]));
  const isKnown = classes.length === names.length && classes.length >= 2;
  return expectedStanding({
    throughAmps,
    chargingAmps: isCompensated ? 0 : charging,
    classBudget: isKnown ? classBudget(classes) : undefined,
    channel: undefined,
  }).rootSumSquareAmps;
}
