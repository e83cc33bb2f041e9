import type { Problem } from '../contract/problem';
import {
  characteristicSchema,
  restraintSchema,
  type CharacteristicOnWire,
  type RestraintOnWire,
} from '../contract/settings-version';
import { RESTRAINT_KINDS, schemeProblems } from '../protection/scheme';
import type { SettingProblem } from '../protection/setting-problem';
import { amount, amountProblems, percentTyped, ratio } from './register-amount';
import type { FromTyped, Typed } from './register-form';

/** The fields of a scheme of any kind: what a form asks for each, and how it is read and filled in. */

export const CHARACTERISTIC_KINDS = ['two-slope', 'adaptive', 'alpha-plane', 'phase-comparison'] as const;
const USUAL_RESTRAINT = { kind: 'scaled-sum', factor: 0.5 } as const;
type Kind = CharacteristicOnWire['kind'];

/** A terminal's three figures of an adaptive scheme have the terminal's key in their fields' names. */
export const CT_FIGURES = ['errorBelow', 'errorAbove', 'limitAmps'] as const;
type CtFigure = (typeof CT_FIGURES)[number];
export const ctField = (figure: CtFigure, terminal: string): string => `${figure}:${terminal}`;

const PICKUP = { pickupAmps: 'the pickup in amperes primary' };
const AMOUNTS: Readonly<Record<Kind, Readonly<Record<string, string>>>> = {
  'two-slope': {
    ...PICKUP,
    slope1: 'the first slope in per cent',
    kneeAmps: 'the knee in amperes of restraint; 0 where there is none',
    slope2: 'the second slope in per cent',
  },
  adaptive: { ...PICKUP, timeErrorMs: 'the residual time error in milliseconds; 0 where there is none' },
  'alpha-plane': {
    ...PICKUP,
    radius: 'the radius, a ratio above 1',
    angleDeg: 'the angle in degrees, up to 360',
  },
  'phase-comparison': {
    toleranceDeg: 'the tolerance angle in degrees, up to 180',
    releaseAmps: 'the release current in amperes primary',
  },
};

export function kindTyped(typed: Readonly<Record<string, string | undefined>>): Kind {
  return CHARACTERISTIC_KINDS.find((kind) => kind === typed.kind) ?? 'two-slope';
}

/**
 * A scheme as a schema takes it, for a line with these terminals (their keys). Only the fields of the chosen kind
 * are read. All that is wrong comes at once, by the form's own field names and in its units.
 */
export function schemeFromTyped(typed: Typed, terminals: readonly string[]): FromTyped {
  const kind = kindTyped(typed);
  const value = {
    characteristic: characteristicFromTyped(typed, terminals),
    restraint: restraintFromTyped(typed),
  };
  const asked = {
    ...AMOUNTS[kind],
    ...(kind === 'adaptive' ? ctAmounts(terminals) : {}),
    ...(value.restraint.kind === 'scaled-sum' ? { factor: 'the factor; one half is common' } : {}),
  };
  const characteristic = characteristicSchema.safeParse(value.characteristic);
  const restraint = restraintSchema.safeParse(value.restraint);
  // A factor still missing is told beside its field and keeps nothing else from being judged
  const judged = characteristic.success
    ? schemeProblems(
        { characteristic: characteristic.data, restraint: restraint.data ?? USUAL_RESTRAINT },
        { terminals },
      )
    : [];
  return {
    value,
    problems: [...amountProblems(typed, asked), ...schemeFieldProblems(judged, terminals)],
  };
}

/** The characteristic that the fields make; a figure that is not typed yet is absent. */
export function characteristicFromTyped(
  typed: Readonly<Record<string, string | undefined>>,
  terminals: readonly string[],
): { kind: Kind } & Record<string, unknown> {
  const kind = kindTyped(typed);
  const pickupAmps = amount(typed.pickupAmps);
  switch (kind) {
    case 'two-slope':
      return {
        ...{ kind, pickupAmps, slope1: ratio(typed.slope1), kneeAmps: amount(typed.kneeAmps) },
        ...{ slope2: ratio(typed.slope2), slopeStart: typed.slopeStart },
      };
    case 'adaptive': {
      const ctErrors = terminals.map((terminal) => ({
        terminal,
        errorBelow: ratio(typed[ctField('errorBelow', terminal)]),
        errorAbove: ratio(typed[ctField('errorAbove', terminal)]),
        limitAmps: amount(typed[ctField('limitAmps', terminal)]),
      }));
      return { kind, pickupAmps, ctErrors, timeErrorMs: amount(typed.timeErrorMs) };
    }
    case 'alpha-plane':
      return { kind, pickupAmps, radius: amount(typed.radius), angleDeg: amount(typed.angleDeg) };
    case 'phase-comparison':
      return { kind, toleranceDeg: amount(typed.toleranceDeg), releaseAmps: amount(typed.releaseAmps) };
  }
}

/** A form offers the choice of restraint only where a kind leaves one. */
function restraintFromTyped(typed: Typed): { kind: string | undefined; factor?: unknown } {
  const kinds = RESTRAINT_KINDS[kindTyped(typed)];
  const kind = kinds.length === 1 ? kinds[0] : typed.restraint;
  return kind === 'scaled-sum' ? { kind, factor: amount(typed.factor) } : { kind };
}

function ctAmounts(terminals: readonly string[]): Record<string, string> {
  return Object.fromEntries(
    terminals.flatMap((terminal) => [
      [ctField('errorBelow', terminal), 'the error up to the limit current in per cent'],
      [ctField('errorAbove', terminal), 'the error above the limit current in per cent'],
      [ctField('limitAmps', terminal), 'the limit current in amperes primary'],
    ]),
  );
}

const SLOPE = 'A slope is 0 to 200 %.';
const CT_ERROR = 'An error is 0 to 100 %.';

/** Problems of a recorded scheme by a form's field names, sentences about a ratio turned into the form's per cent. */
export function schemeFieldProblems(
  problems: readonly SettingProblem[],
  terminals: readonly string[],
): Problem['fields'] {
  return problems.map(({ field, problem }) => {
    const [, index, figure] = /ctErrors\.(\d+)\.(\w+)$/.exec(field) ?? [];
    const ctFigure = CT_FIGURES.find((each) => each === figure);
    if (index !== undefined && ctFigure !== undefined)
      return {
        field: ctField(ctFigure, terminals[Number(index)] ?? ''),
        problem: ctFigure === 'limitAmps' ? problem : CT_ERROR,
      };
    const last = field.split('.').at(-1) ?? field;
    if (field === 'restraint.kind') return { field: 'restraint', problem };
    return { field: last, problem: /slope must be a ratio/.test(problem) ? SLOPE : problem };
  });
}

/** A recorded scheme as the fields of a form hold it. */
export function schemeTyped({
  characteristic,
  restraint,
}: {
  characteristic: CharacteristicOnWire;
  restraint: RestraintOnWire;
}): Typed {
  return {
    ...STARTING_SCHEME,
    ...characteristicTyped(characteristic),
    ...(restraint.kind === 'scaled-sum'
      ? { restraint: restraint.kind, factor: String(restraint.factor) }
      : {}),
    ...(restraint.kind === 'maximum' ? { restraint: restraint.kind } : {}),
  };
}

/** What a form begins with: the conventions in common use, and no figures. */
export const STARTING_SCHEME: Typed = {
  ...{ kind: 'two-slope', slopeStart: 'from-zero', restraint: 'scaled-sum', factor: '0.5' },
};

function characteristicTyped(characteristic: CharacteristicOnWire): Typed {
  switch (characteristic.kind) {
    case 'two-slope':
      return {
        ...{ kind: characteristic.kind, slopeStart: characteristic.slopeStart },
        ...{ pickupAmps: String(characteristic.pickupAmps), kneeAmps: String(characteristic.kneeAmps) },
        ...{ slope1: percentTyped(characteristic.slope1), slope2: percentTyped(characteristic.slope2) },
      };
    case 'adaptive':
      return {
        ...{ kind: characteristic.kind, pickupAmps: String(characteristic.pickupAmps) },
        timeErrorMs: String(characteristic.timeErrorMs),
        ...Object.fromEntries(
          characteristic.ctErrors.flatMap(({ terminal, errorBelow, errorAbove, limitAmps }) => [
            [ctField('errorBelow', terminal), percentTyped(errorBelow)],
            [ctField('errorAbove', terminal), percentTyped(errorAbove)],
            [ctField('limitAmps', terminal), String(limitAmps)],
          ]),
        ),
      };
    case 'alpha-plane':
      return {
        ...{ kind: characteristic.kind, pickupAmps: String(characteristic.pickupAmps) },
        ...{ radius: String(characteristic.radius), angleDeg: String(characteristic.angleDeg) },
      };
    case 'phase-comparison':
      return {
        ...{ kind: characteristic.kind, toleranceDeg: String(characteristic.toleranceDeg) },
        releaseAmps: String(characteristic.releaseAmps),
      };
  }
}
