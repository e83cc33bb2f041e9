import { expectedTerminals } from '../contract/expected-terminals';
import type { RegisterLine } from '../contract/register';
import { classBudget, CT_CLASSES, ctClassNamed } from '../protection/ct-class';
import { isComputable } from '../protection/evaluation';
import { expectedStanding } from '../protection/expected-standing';
import { measuredModel } from '../protection/line-model';
import { loadability } from '../protection/loadability';
import type { SeparatedComposition } from '../standing/composition';
import { lineSusceptanceMillisiemens } from '../view/line-zone';
import type { SchemeVersion } from './roster';

/** Power-factor angles that a prediction for emergency rating ranges over, either way of the power. */
const LAG_RAD_MOST = Math.PI / 6;

/** Utilisation of one phase at emergency rating by its measured composition; undefined where it can't be told. */
export function emergencyUtilisation(
  line: RegisterLine,
  version: SchemeVersion,
  composition: SeparatedComposition,
): number | undefined {
  const { hasVoltage, terminalCount } = composition.shape;
  if (!hasVoltage) return undefined;
  const [admittance, ...mismatches] = composition.coefficients;
  const { frequencyHz } = version.conditions;
  const model = measuredModel(
    // what the scheme compensates is out of these sums already
    { terminalCount, voltageKv: line.voltageKv, compensatedMillisiemens: 0 },
    { admittanceMillisiemens: admittance!, mismatches },
  );
  const range = { frequencyHz, lagRadLeast: -LAG_RAD_MOST, lagRadMost: LAG_RAD_MOST };
  const found = loadability({ scheme: version.scheme, model, range }, line);
  return isComputable(found) ? found.atEmergency.utilisation : undefined;
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
