/**
 * Compensation of the charging current by measured voltages: jωC′l·V̄ is subtracted from the differential
 * current of each phase, with V̄ the mean of the valid phase-to-earth voltages at the line's terminals.
 *
 * It takes the positive-sequence capacitance for every phase by itself. In a system with much zero-sequence
 * voltage the phases couple, and a part of the charging then remains.
 */
import { scale, subtract, sum } from './phasor';
import type { Phasor } from './phasor';

/** What charging compensation of one phase goes by. */
export interface ChargingSupply {
  /** phase-to-earth voltages at the line's terminals, kilovolts rms; undefined where one is missing or not valid */
  readonly voltagesKv: readonly (Phasor | undefined)[];
  /** ωC′l of the whole line, millisiemens; undefined where the register lacks a constant */
  readonly susceptanceMillisiemens: number | undefined;
}

/**
 * Whether the charging current was taken out. Where it could not be, the differential current is the measured
 * one, charging included, and the reason is a whole sentence that goes on the screen.
 */
export type Compensation =
  | {
      readonly state: 'compensated';
      /** the charging current that was taken out, amperes rms primary into the line */
      readonly charging: Phasor;
      /** how many terminals' voltages the mean was formed from */
      readonly voltageCount: number;
    }
  | { readonly state: 'fallback'; readonly reason: string };

/** The charging current that the voltages drive into one phase, or why it can't be told. */
export function chargingCompensation({ voltagesKv, susceptanceMillisiemens }: ChargingSupply): Compensation {
  if (susceptanceMillisiemens === undefined) {
    return fallback('the register does not hold the line’s capacitance');
  }
  const valid = voltagesKv.filter((voltage) => voltage !== undefined);
  if (valid.length === 0) return fallback('no terminal gives a valid voltage');
  const mean = scale(sum(valid), 1 / valid.length);
  return {
    state: 'compensated',
    charging: { re: -susceptanceMillisiemens * mean.im, im: susceptanceMillisiemens * mean.re },
    voltageCount: valid.length,
  };
}

/** The differential current of one phase less its charging, amperes rms primary; as measured on the fallback. */
export function compensatedDifferential(
  differential: Phasor,
  supply: ChargingSupply,
): { readonly differential: Phasor; readonly compensation: Compensation } {
  const compensation = chargingCompensation(supply);
  const isCompensated = compensation.state === 'compensated';
  return {
    differential: isCompensated ? subtract(differential, compensation.charging) : differential,
    compensation,
  };
}

/**
 * The terminals' currents of one phase with each terminal's equal share of the charging taken out, as each end of
 * a line's π supplies its half. Their sum is the compensated differential, and restraint, ratio and angle are
 * formed from what is left, too. As measured on the fallback.
 */
export function compensatedCurrents(
  currents: readonly Phasor[],
  compensation: Compensation,
): readonly Phasor[] {
  if (compensation.state === 'fallback') return currents;
  const share = scale(compensation.charging, 1 / currents.length);
  return currents.map((current) => subtract(current, share));
}

function fallback(because: string): Compensation {
  return { state: 'fallback', reason: `The charging current is not compensated, because ${because}.` };
}
