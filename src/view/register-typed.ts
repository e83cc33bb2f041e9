import type { Problem } from '../contract/problem';
import { compensationProblems } from '../store/register-rules';
import { amount, amountProblems } from './register-amount';
import type { FromTyped, Typed } from './register-form';
import { typedInstant } from './register-instant';
import { schemeFromTyped } from './register-scheme-typed';

const LINE_AMOUNTS = {
  voltageKv: 'the nominal voltage in kV',
  ratingAmps: 'the rating in amperes',
  emergencyRatingAmps: 'the emergency rating in amperes',
  lengthKm: 'the length in km',
};

/** Figures that may stay unknown. */
const CONSTANTS = {
  capacitanceNfPerKm: 'the capacitance in nF per km',
  leastInternalFaultAmps: 'the least internal fault current in amperes',
};

/** A terminal behind the transformer has a box of its own. */
export const behindField = (terminal: string): string => `${BEHIND}${terminal}`;
const BEHIND = 'behind:';

function transformerFromTyped(typed: Typed): Record<string, unknown> {
  const behind = Object.keys(typed).filter((field) => field.startsWith(BEHIND));
  return {
    otherVoltageKv: amount(typed.otherVoltageKv),
    clockNumber: amount(typed.clockNumber),
    otherTerminals: behind.map((field) => field.slice(BEHIND.length)),
    removesZeroSequence: {
      line: typed.removesLineZero !== undefined,
      other: typed.removesOtherZero !== undefined,
    },
  };
}

/** The facts of a line as a schema of the register takes them. */
export function lineFromTyped(typed: Typed): FromTyped {
  const hasTransformer = typed.hasTransformer !== undefined;
  const given = Object.entries(CONSTANTS).filter(([field]) => amount(typed[field]) !== undefined);
  return {
    value: {
      name: typed.name ?? '',
      owner: (typed.owner ?? '').trim() || null,
      ...Object.fromEntries(Object.keys(LINE_AMOUNTS).map((field) => [field, amount(typed[field])])),
      kind: typed.kind,
      ...Object.fromEntries(Object.keys(CONSTANTS).map((field) => [field, amount(typed[field]) ?? null])),
      goesBy: typed.goesBy,
      inService: typed.inService !== undefined,
      seriesCompensated: typed.seriesCompensated !== undefined,
      inZoneTransformer: hasTransformer ? transformerFromTyped(typed) : null,
    },
    problems: [
      ...amountProblems(typed, LINE_AMOUNTS),
      ...amountProblems(typed, Object.fromEntries(given)),
      ...(hasTransformer
        ? amountProblems(typed, {
            otherVoltageKv: 'the other voltage in kV',
            clockNumber: 'the clock number, 0 to 11',
          })
        : []),
    ],
  };
}

/** A terminal as a schema takes it; `substations` are the names of those that the register knows, by key. */
export function terminalFromTyped(typed: Typed, substations: ReadonlyMap<string, string>): FromTyped {
  const chosen = typed.substation ?? '';
  const isNew = chosen === '';
  const key = isNew ? (typed.newSubstation ?? '').trim() : chosen;
  return {
    value: {
      substation: key,
      substationName: isNew ? (typed.newSubstationName ?? '') : substations.get(key),
      ctPrimaryAmps: amount(typed.ctPrimaryAmps),
      ctClass: typed.ctClass ?? '',
      inService: typed.inService !== undefined,
    },
    problems: amountProblems(typed, { ctPrimaryAmps: 'the rated primary current in amperes' }),
  };
}

/** What a version of settings is judged against: the site's clock and the line that it is for. */
export interface SettingsPlace {
  readonly timeZone: string;
  /** keys of the line's terminals, in their order */
  readonly terminals: readonly string[];
  readonly capacitanceNfPerKm: number | null;
}

/** A version of settings as a schema takes it: ratios are typed in per cent, the instant in the site's time zone. */
export function settingsFromTyped(typed: Typed, place: SettingsPlace): FromTyped {
  const instant = typedInstant(typed.validFrom ?? '', place.timeZone);
  const scheme = schemeFromTyped(typed, place.terminals);
  const chargingCompensation = typed.chargingCompensation !== undefined;
  return {
    value: {
      validFrom: instant.ok ? instant.iso : undefined,
      ...scheme.value,
      chargingCompensation,
      note: typed.note ?? '',
    },
    problems: [
      ...(instant.ok ? [] : [{ field: 'validFrom', problem: instant.problem }]),
      ...scheme.problems,
      ...compensationProblems({ chargingCompensation }, place),
    ],
  };
}

/**
 * Problems by the name of the form's field: the last part of their path, the first problem of each. What the
 * typing told comes first, since it speaks the form's units.
 */
export function problemsByField(...lists: readonly Problem['fields'][]): Record<string, string> {
  const byField: Record<string, string> = {};
  for (const { field, problem } of lists.flat()) byField[field.split('.').at(-1) ?? field] ??= problem;
  return byField;
}
