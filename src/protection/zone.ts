import { chargingCompensation, compensatedCurrents } from './charging-compensation';
import type { Compensation } from './charging-compensation';
import { perPhase } from './phase';
import type { PerPhase } from './phase';
import type { Phasor } from './phasor';
import type { SettingProblem } from './setting-problem';
import { isOnLineSide, throughMatrix, windingMatrix, windingProblems } from './winding-compensation';
import type { WindingCompensation } from './winding-compensation';

/** The most terminals that a zone is evaluated with. */
export const ZONE_TERMINALS_MOST = 6;

/** What lies between the terminals of a line and is taken out before a scheme judges its currents. */
export interface Zone {
  /** one for each terminal, in the order of the currents; undefined where a terminal is on the line itself */
  readonly windings: readonly (WindingCompensation | undefined)[];
  /** undefined where the scheme does not compensate the charging current */
  readonly charging: { readonly susceptanceMillisiemens: number | undefined } | undefined;
}

/** What one terminal measured at an instant: amperes rms primary into the line, kilovolts rms to earth. */
export interface TerminalPhasors {
  readonly currents: PerPhase<Phasor>;
  /** undefined where there are no voltages or they are not valid */
  readonly voltagesKv: PerPhase<Phasor> | undefined;
}

/** One phase of a zone as a scheme judges it: amperes rms primary on the line's side, in the terminals' order. */
export interface ZonePhase {
  readonly currents: readonly Phasor[];
  /** undefined where the scheme does not compensate the charging current */
  readonly compensation: Compensation | undefined;
}

/**
 * The currents of each phase of a zone, with transformers and charging taken out as the zone says. The charging
 * goes by the voltages of the terminals on the line itself: those behind a transformer are another voltage.
 * Throws when there are not as many terminals as windings.
 */
export function zonePhases(zone: Zone, terminals: readonly TerminalPhasors[]): PerPhase<ZonePhase> {
  if (terminals.length !== zone.windings.length) {
    throw new RangeError(`${terminals.length} terminals do not pair with ${zone.windings.length} windings.`);
  }
  const onLineSide = terminals.map(({ currents }, index) => lineSide(zone.windings[index], currents));
  return perPhase((phase) => {
    const currents = onLineSide.map((terminal) => terminal[phase]);
    if (zone.charging === undefined) return { currents, compensation: undefined };
    const compensation = chargingCompensation({
      voltagesKv: terminals.map((terminal, index) =>
        isLine(zone.windings[index]) ? terminal.voltagesKv?.[phase] : undefined,
      ),
      susceptanceMillisiemens: zone.charging.susceptanceMillisiemens,
    });
    return { currents: compensatedCurrents(currents, compensation), compensation };
  });
}

/** A transformer of two windings in the zone, with the terminals that lie behind it. */
export interface ZoneTransformer {
  /** voltage of the winding away from the line, kilovolts phase to phase */
  readonly otherVoltageKv: number;
  readonly clockNumber: number;
  readonly otherTerminals: readonly string[];
  readonly removesZeroSequence: { readonly line: boolean; readonly other: boolean };
}

/**
 * How each terminal's currents are brought to the line's voltage (kilovolts phase to phase), for these terminals
 * in this order and a transformer or none.
 */
export function zoneWindings(
  terminals: readonly string[],
  { voltageKv, transformer }: { voltageKv: number; transformer: ZoneTransformer | undefined },
): Zone['windings'] {
  if (transformer === undefined) return terminals.map(() => undefined);
  const { otherVoltageKv, clockNumber, otherTerminals, removesZeroSequence } = transformer;
  const zeroSequence = (isRemoved: boolean) => (isRemoved ? 'removed' : 'kept');
  const line = { ratio: 1, clockNumber: 0, zeroSequence: zeroSequence(removesZeroSequence.line) } as const;
  const other = {
    ratio: voltageKv / otherVoltageKv,
    clockNumber,
    zeroSequence: zeroSequence(removesZeroSequence.other),
  } as const;
  return terminals.map((key) => (otherTerminals.includes(key) ? other : line));
}

/** Everything that is wrong with a zone, at once; empty when it can be evaluated. Fields are paths into the zone. */
export function zoneProblems({ windings, charging }: Zone): readonly SettingProblem[] {
  const problems: SettingProblem[] = windings.flatMap((winding, index) =>
    winding === undefined
      ? []
      : windingProblems(winding).map(({ field, problem }) => ({
          field: `windings.${index}.${field}`,
          problem,
        })),
  );
  if (windings.length > ZONE_TERMINALS_MOST) {
    const problem = `A line has at most ${ZONE_TERMINALS_MOST} terminals; this one has ${windings.length}.`;
    problems.push({ field: 'windings', problem });
  }
  if (charging !== undefined && charging.susceptanceMillisiemens === undefined) {
    problems.push({
      field: 'charging',
      problem: 'The charging current can be compensated only when the line’s capacitance is recorded.',
    });
  }
  return problems;
}

function lineSide(winding: WindingCompensation | undefined, currents: PerPhase<Phasor>): PerPhase<Phasor> {
  return winding === undefined ? currents : throughMatrix(windingMatrix(winding), currents);
}

function isLine(winding: WindingCompensation | undefined): boolean {
  return winding === undefined || isOnLineSide(winding);
}
