import { errorSumAmps } from './adaptive';
import { characteristicProblems } from './characteristic';
import type { Characteristic } from './characteristic';
import type { Phasor } from './phasor';
import { isMagnitudeRestraint, restraintAmps, restraintProblems } from './restraint';
import type { Restraint } from './restraint';
import type { SettingProblem } from './setting-problem';

/** What a line's phases are judged by: the recorded characteristic and the convention of its restraint. */
export interface Scheme {
  readonly characteristic: Characteristic;
  readonly restraint: Restraint;
}

/** What a scheme needs to know beside the currents. */
export interface Conditions {
  readonly frequencyHz: number;
}

/** The restraints that go with each kind of characteristic; a form offers these and no others. */
export const RESTRAINT_KINDS: Readonly<Record<Characteristic['kind'], readonly Restraint['kind'][]>> = {
  'two-slope': ['scaled-sum', 'maximum'],
  adaptive: ['error-sum'],
  'alpha-plane': ['none'],
  'phase-comparison': ['none'],
};

const RESTRAINT_ALLOWED: Readonly<Record<Characteristic['kind'], string>> = {
  'two-slope': 'A two-slope characteristic goes with the scaled sum or the greatest magnitude as restraint.',
  adaptive: 'An adaptive characteristic goes with its own restraint, the sum of errors.',
  'alpha-plane': 'An alpha plane has a region and forms no restraint current.',
  'phase-comparison': 'A phase comparison weighs angles and forms no restraint current.',
};

/** Why a scheme's characteristic and restraint do not go together, as a sentence; `undefined` when they do. */
export function pairingProblem({ characteristic, restraint }: Scheme): string | undefined {
  const allowed = RESTRAINT_KINDS[characteristic.kind].includes(restraint.kind);
  return allowed ? undefined : RESTRAINT_ALLOWED[characteristic.kind];
}

/**
 * Restraint current in amperes rms primary by the scheme's own convention. `undefined` where it forms none, and
 * where the recorded restraint does not go with the characteristic. The currents of an adaptive scheme come in
 * the order of its transformer errors; throws when they are not as many.
 */
export function schemeRestraintAmps(
  { characteristic, restraint }: Scheme,
  currents: readonly Phasor[],
  { frequencyHz }: Conditions,
): number | undefined {
  switch (characteristic.kind) {
    case 'two-slope':
      return isMagnitudeRestraint(restraint) ? restraintAmps(restraint, currents) : undefined;
    case 'adaptive':
      return restraint.kind === 'error-sum' ? errorSumAmps(characteristic, currents, frequencyHz) : undefined;
    case 'alpha-plane':
    case 'phase-comparison':
      return undefined;
  }
}

/**
 * The scheme with its per-terminal figures in the order of these terminals and for no others: how it is
 * evaluated with the currents of the terminals in service. A terminal that the scheme does not know leaves a
 * gap, which the evaluation then reports.
 */
export function schemeAtTerminals(scheme: Scheme, terminals: readonly string[]): Scheme {
  const { characteristic } = scheme;
  if (characteristic.kind !== 'adaptive') return scheme;
  const ctErrors = terminals.flatMap((key) =>
    characteristic.ctErrors.filter(({ terminal }) => terminal === key).slice(0, 1),
  );
  return { ...scheme, characteristic: { ...characteristic, ctErrors } };
}

/**
 * Everything that is wrong with a scheme on a line with these terminals (their keys), at once; empty when it can
 * be recorded. Fields are paths into the scheme, such as `characteristic.pickupAmps`.
 */
export function schemeProblems(
  scheme: Scheme,
  { terminals }: { readonly terminals: readonly string[] },
): readonly SettingProblem[] {
  const under = (part: keyof Scheme) => (found: SettingProblem) => ({
    field: `${part}.${found.field}`,
    problem: found.problem,
  });
  const pairing = pairingProblem(scheme);
  return [
    ...characteristicProblems(scheme.characteristic).map(under('characteristic')),
    ...terminalProblems(scheme.characteristic, terminals).map(under('characteristic')),
    ...restraintProblems(scheme.restraint).map(under('restraint')),
    ...(pairing === undefined ? [] : [{ field: 'restraint.kind', problem: pairing }]),
  ];
}

function terminalProblems(
  characteristic: Characteristic,
  terminals: readonly string[],
): readonly SettingProblem[] {
  switch (characteristic.kind) {
    case 'two-slope':
    case 'alpha-plane':
      return [];
    case 'phase-comparison':
      return terminals.length > 2 ? [{ field: 'kind', problem: tooManyTerminals(terminals.length) }] : [];
    case 'adaptive':
      return ctErrorTerminalProblems(
        characteristic.ctErrors.map(({ terminal }) => terminal),
        terminals,
      );
  }
}

function tooManyTerminals(count: number): string {
  return `A phase comparison weighs two terminals against each other; this line has ${count}.`;
}

function ctErrorTerminalProblems(stated: readonly string[], terminals: readonly string[]): SettingProblem[] {
  const missing = terminals.filter((key) => !stated.includes(key));
  const unknown = stated.flatMap((key, index) => (terminals.includes(key) ? [] : [{ key, index }]));
  return [
    ...missing.map((key) => ({ field: 'ctErrors', problem: `State the transformer errors of ${key}.` })),
    ...unknown.map(({ key, index }) => ({
      field: `ctErrors.${index}.terminal`,
      problem: `This line has no terminal ${key}.`,
    })),
  ];
}
