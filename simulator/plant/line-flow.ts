import type { Complex } from './complex';
import { add, multiply, scale, scaleByJ, subtract } from './complex';

/** A stretch of line as one π: series impedance, and half its shunt susceptance at each end. */
export type PiSection = { readonly impedanceOhm: Complex; readonly susceptanceS: number };

/** What truly flows at one terminal and phase: amperes into the line and volts to earth, rms. */
export type TerminalFlow = { readonly amps: Complex; readonly volts: Complex };

/** Both ends of a π, given the voltage of the first and the current through the series impedance from it. */
export function twoTerminalFlow(
  section: PiSection,
  firstVolts: Complex,
  throughAmps: Complex,
): readonly [TerminalFlow, TerminalFlow] {
  const lastVolts = subtract(firstVolts, multiply(section.impedanceOhm, throughAmps));
  return [
    { amps: add(throughAmps, halfCharging(section, firstVolts)), volts: firstVolts },
    { amps: subtract(halfCharging(section, lastVolts), throughAmps), volts: lastVolts },
  ];
}

/**
 * Three π sections that meet at a tee. The first terminal's voltage and its current through the series impedance
 * are given, and the share of it that the second terminal takes; what is left, less the charging that the tee's
 * end of each section draws, leaves by the third.
 */
export function teeFlow(
  sections: readonly [PiSection, PiSection, PiSection],
  first: { readonly volts: Complex; readonly throughAmps: Complex },
  secondShare: number,
): readonly [TerminalFlow, TerminalFlow, TerminalFlow] {
  const teeVolts = subtract(first.volts, multiply(sections[0].impedanceOhm, first.throughAmps));
  const teeSusceptanceS = sections.reduce((sum, section) => sum + section.susceptanceS, 0) / 2;
  const secondAmps = scale(first.throughAmps, -secondShare);
  const thirdAmps = subtract(subtract(scaleByJ(teeVolts, teeSusceptanceS), first.throughAmps), secondAmps);
  const far = (section: PiSection, seriesAmps: Complex): TerminalFlow => {
    const volts = add(teeVolts, multiply(section.impedanceOhm, seriesAmps));
    return { amps: add(seriesAmps, halfCharging(section, volts)), volts };
  };
  return [
    { amps: add(first.throughAmps, halfCharging(sections[0], first.volts)), volts: first.volts },
    far(sections[1], secondAmps),
    far(sections[2], thirdAmps),
  ];
}

const halfCharging = (section: PiSection, volts: Complex): Complex =>
  scaleByJ(volts, section.susceptanceS / 2);
