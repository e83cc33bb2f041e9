import type { Problem } from '../contract/problem';
import { characteristicProblems, type Characteristic } from '../protection/characteristic';
import { typedInstant } from './register-instant';

/** What stood in a form's fields, by name; a box that was not ticked is absent. */
export type Typed = Readonly<Record<string, string>>;

/** What a schema is to judge, and what could already be told from the typing itself. */
export interface FromTyped {
  readonly value: Record<string, unknown>;
  readonly problems: Problem['fields'];
}

/** An amount as typed: absent when nothing was, the text itself when it is not a number, so that a schema refuses it. */
function amount(text: string | undefined): number | string | undefined {
  const trimmed = (text ?? '').trim();
  if (trimmed === '') return undefined;
  const number = Number(trimmed.replace(',', '.'));
  // "1,200" may mean 1200 or 1.2: nobody may guess in a register
  if (/,\d{3}$/.test(trimmed) || !Number.isFinite(number)) return trimmed;
  return number;
}

const ratio = (text: string | undefined): number | string | undefined => {
  const percent = amount(text);
  // Rounded at a millionth of a per cent: 30 % is 0.3 and not 0.30000000000000004
  return typeof percent === 'number' ? Math.round(percent * 1e6) / 1e8 : percent;
};

function amountProblems(typed: Typed, names: Readonly<Record<string, string>>): Problem['fields'] {
  return Object.entries(names).flatMap(([field, what]) => {
    const value = amount(typed[field]);
    if (value === undefined) return [{ field, problem: `Give ${what}.` }];
    if (typeof value === 'number') return [];
    return [{ field, problem: 'Give a number, with a point for decimals and nothing between thousands.' }];
  });
}

const LINE_AMOUNTS = {
  voltageKv: 'the nominal voltage in kV',
  ratingAmps: 'the rating in amperes',
  emergencyRatingAmps: 'the emergency rating in amperes',
  lengthKm: 'the length in km',
};

/** The facts of a line as a schema of the register takes them. */
export function lineFromTyped(typed: Typed): FromTyped {
  const hasTransformer = typed.hasTransformer !== undefined;
  const capacitance = amount(typed.capacitanceNfPerKm);
  return {
    value: {
      name: typed.name ?? '',
      ...Object.fromEntries(Object.keys(LINE_AMOUNTS).map((field) => [field, amount(typed[field])])),
      kind: typed.kind,
      capacitanceNfPerKm: capacitance ?? null,
      goesBy: typed.goesBy,
      inService: typed.inService !== undefined,
      seriesCompensated: typed.seriesCompensated !== undefined,
      inZoneTransformer: hasTransformer
        ? { otherVoltageKv: amount(typed.otherVoltageKv), clockNumber: amount(typed.clockNumber) }
        : null,
    },
    problems: [
      ...amountProblems(typed, LINE_AMOUNTS),
      ...(capacitance === undefined ? [] : amountProblems(typed, { capacitanceNfPerKm: 'the capacitance' })),
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

const SETTINGS_AMOUNTS = {
  pickupAmps: 'the pickup in amperes primary',
  slope1: 'the first slope in per cent',
  kneeAmps: 'the knee in amperes of restraint; 0 where there is none',
  slope2: 'the second slope in per cent',
};
const SLOPE_PERCENT_MOST = 200;

/** A version of settings as a schema takes it: slopes are typed in per cent, the instant in the site's time zone. */
export function settingsFromTyped(typed: Typed, timeZone: string): FromTyped {
  const instant = typedInstant(typed.validFrom ?? '', timeZone);
  const isScaledSum = typed.restraint === 'scaled-sum';
  const characteristic = {
    kind: 'two-slope',
    pickupAmps: amount(typed.pickupAmps),
    slope1: ratio(typed.slope1),
    kneeAmps: amount(typed.kneeAmps),
    slope2: ratio(typed.slope2),
    slopeStart: typed.slopeStart,
  };
  return {
    value: {
      validFrom: instant.ok ? instant.iso : undefined,
      characteristic,
      restraint: isScaledSum
        ? { kind: 'scaled-sum', factor: amount(typed.factor) }
        : { kind: typed.restraint },
      note: typed.note ?? '',
    },
    problems: [
      ...(instant.ok ? [] : [{ field: 'validFrom', problem: instant.problem }]),
      ...amountProblems(typed, SETTINGS_AMOUNTS),
      ...['slope1', 'slope2'].flatMap((field) => slopeProblems(field, typed[field])),
      ...(isJudgeable(characteristic) ? characteristicProblems(characteristic) : []),
      ...(isScaledSum ? amountProblems(typed, { factor: 'the factor; one half is common' }) : []),
    ],
  };
}

/** Whether every figure is there as a number, so that their combination can be judged. */
function isJudgeable(
  characteristic: Record<keyof Characteristic, unknown>,
): characteristic is Characteristic {
  const { pickupAmps, slope1, kneeAmps, slope2 } = characteristic;
  return [pickupAmps, slope1, kneeAmps, slope2].every((value) => typeof value === 'number');
}

function slopeProblems(field: string, text: string | undefined): Problem['fields'] {
  const percent = amount(text);
  if (typeof percent !== 'number' || (percent >= 0 && percent <= SLOPE_PERCENT_MOST)) return [];
  return [{ field, problem: `A slope is 0 to ${SLOPE_PERCENT_MOST} %.` }];
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
