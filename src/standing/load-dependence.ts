import { minus } from './complex';
import type { Complex } from './complex';
import { composition, mismatchFrom } from './composition';
import type { Estimate } from './composition';
import { fittedCoefficients } from './composition-fit';
import { shapeOf, snapshotCount, subtractSums, totalOf } from './composition-sums';
import type { CompositionSums } from './composition-sums';
import type { HourSums } from './composition-step';
import { pOfZero } from './hotelling';
import { ascending, quantileOfSome } from './quantile';
import { rmsAmps, withSteadyCurrent } from './steady-current';

/** Whether the mismatch of a terminal changes with its load, and what that does to the charging. */
export interface LoadDependence {
  readonly kind: 'told';
  /** The mismatch differs between light and heavy load by more than chance explains. */
  readonly isSignificant: boolean;
  /** Two-sided, of a terminal whose mismatch stays the same; the least of all terminals times their number. */
  readonly pTwoSided: number;
  /** Place of the terminal in the register's order, from 0; the one of the least p. */
  readonly terminal: number;
  /** Its mismatch e at light load less that at heavy load: Re ratio, per unit, Im angle, radians. */
  readonly changeAtLightLoad: Complex;
  /** Light and heavy load: the current that one hour in ten stays under, and that one in ten exceeds; amperes. */
  readonly lightAmps: number;
  readonly heavyAmps: number;
  /** Im Y, siemens/1000, with the mismatch free to change with load: far wider than without. */
  readonly susceptanceMillisiemens: Estimate;
  /** From the least to the greatest that the intervals with and without such a change reach; its value is without. */
  readonly susceptanceEither: Estimate;
  readonly days: number;
}

/**
 * `no composition`: the window has none with a voltage, or none with one more term. Without a voltage the charging
 * stands in the mismatches, and they change with load whatever the transformers do.
 */
export type LoadDependenceVerdict = LoadDependence | { readonly kind: 'no composition' };

/** A step under the usual 0.01: neighbouring days are a little alike, and then a jackknife of days claims too much. */
const P_MOST = 0.002;

/** Currents and a term of the same currents are never far from proportional; only rounding would matter here. */
const CONDITION_MOST = 1e6;

/**
 * Whether a transformer's error grows at small current, from the hours of one phase in a window. To the composition
 * comes one term a terminal: its current at a steady size, which a mismatch that falls with 1/|I| makes, and any that
 * grows as the current falls makes in part. Its coefficient is held against 0 by a delete-one-day jackknife. The charging is steady too, so that only a changing
 * power factor tells the two apart: small changes go unseen, and the charging's interval with the term is wide. Of two terminals either
 * one's error is seen; of more the first one's is not.
 */
export function loadDependence(
  hours: readonly HourSums[],
  { frequencyHz }: { readonly frequencyHz: number },
): LoadDependenceVerdict {
  const counted = hours.filter(({ sums }) => snapshotCount(sums) > 0);
  const first = counted[0];
  if (first === undefined || !shapeOf(first.sums).hasVoltage) return { kind: 'no composition' };
  const plain = composition(dayRows(counted), { frequencyHz });
  const terminals = Array.from({ length: shapeOf(first.sums).terminalCount - 1 }, (_, index) => index + 1);
  const found = terminals.flatMap((terminal) => ofTerminal(counted, { terminal, frequencyHz }) ?? []);
  const surest = found.sort((one, other) => one.pTwoSided - other.pTwoSided)[0];
  const without = plain.kind === 'separated' ? plain.susceptanceMillisiemens : undefined;
  if (surest === undefined || without === undefined) return { kind: 'no composition' };
  const pTwoSided = Math.min(1, surest.pTwoSided * terminals.length);
  const { low, high } = surest.susceptanceMillisiemens;
  return {
    ...surest,
    kind: 'told',
    isSignificant: pTwoSided < P_MOST,
    pTwoSided,
    susceptanceEither: {
      value: without.value,
      low: Math.min(low, without.low),
      high: Math.max(high, without.high),
    },
  };
}

function ofTerminal(
  hours: readonly HourSums[],
  { terminal, frequencyHz }: { terminal: number; frequencyHz: number },
): Omit<LoadDependence, 'kind' | 'isSignificant' | 'susceptanceEither'> | undefined {
  const currents = ascending(hours.map(({ sums }) => rmsAmps(sums, terminal)).filter((amps) => amps > 0));
  if (currents.length === 0) return undefined;
  const [lightAmps, heavyAmps] = [quantileOfSome(currents, 0.1), quantileOfSome(currents, 0.9)];
  const steadyAmps = quantileOfSome(currents, 0.5);
  const days = dayRows(
    hours.flatMap(({ hour, sums }) => {
      const widened = withSteadyCurrent(sums, { terminal, steadyAmps });
      return widened === undefined ? [] : [{ hour, sums: widened }];
    }),
  );
  const refitted = composition(days, { frequencyHz, conditionMost: CONDITION_MOST });
  if (refitted.kind !== 'separated' || refitted.susceptanceMillisiemens === undefined) return undefined;
  const term = refitted.coefficients.at(-1)!;
  const replicates = termWithoutEachDay(days);
  const pTwoSided = replicates && pOfZero(term, replicates);
  if (pTwoSided === undefined) return undefined;
  const own = refitted.coefficients[terminal]!;
  const mismatchAt = (amps: number) =>
    mismatchFrom({ re: own.re + (term.re * steadyAmps) / amps, im: own.im + (term.im * steadyAmps) / amps });
  return {
    pTwoSided,
    terminal,
    changeAtLightLoad: minus(mismatchAt(lightAmps), mismatchAt(heavyAmps)),
    lightAmps,
    heavyAmps,
    susceptanceMillisiemens: refitted.susceptanceMillisiemens,
    days: refitted.days,
  };
}

function dayRows(hours: readonly HourSums[]): CompositionSums[] {
  const byDay = new Map<number, CompositionSums[]>();
  for (const { hour, sums } of hours) {
    const day = Math.floor(hour / 24);
    const ofDay = byDay.get(day);
    if (ofDay === undefined) byDay.set(day, [sums]);
    else ofDay.push(sums);
  }
  return [...byDay.values()].map((rows) => totalOf(rows)!);
}

/** The coefficient of the last regressor without each of the days; `undefined` where there is a day it hangs on. */
function termWithoutEachDay(days: readonly CompositionSums[]): Complex[] | undefined {
  const total = totalOf(days)!;
  const terms = days.flatMap((day) => fittedCoefficients(subtractSums(total, day))?.at(-1) ?? []);
  return terms.length === days.length ? terms : undefined;
}
