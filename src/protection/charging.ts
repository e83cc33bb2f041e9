/**
 * Charging of a line in service, from the line constants of its data sheet.
 *
 * Symmetrical system, nominal voltage all along, line open at no end: total charging current per phase
 * I = ω·C′·l·U/√3 = b·l·U/√3 and total reactive power Q = b·l·U². Source: any text on line parameters, for
 * instance P. Kundur, "Power System Stability and Control", 1994, chapter 6.
 */

/** A stretch of line of one kind; a mixed line is the sum of its stretches. */
export interface ChargedLine {
  /** Positive-sequence shunt susceptance at the system's frequency, microsiemens per kilometre. */
  readonly susceptanceMicrosiemensPerKm: number;
  readonly lengthKm: number;
  /** Nominal voltage, kilovolts rms phase to phase. */
  readonly voltageKv: number;
}

/** Shunt susceptance b = ω·C′ in µS/km of an operating capacitance in nF/km. */
export function susceptanceMicrosiemensPerKm(
  capacitanceNanofaradsPerKm: number,
  frequencyHz: number,
): number {
  const angularFrequency = 2 * Math.PI * frequencyHz;
  return (angularFrequency * capacitanceNanofaradsPerKm) / 1000;
}

/** Susceptance ωC′l of the whole line, millisiemens: amperes of charging per kilovolt to earth. */
export function lineSusceptanceMillisiemens({
  susceptanceMicrosiemensPerKm,
  lengthKm,
}: Omit<ChargedLine, 'voltageKv'>): number {
  return (susceptanceMicrosiemensPerKm * lengthKm) / 1000;
}

/** Total charging current per phase, amperes rms: what the differential current shows without compensation. */
export function chargingAmps(line: ChargedLine): number {
  return lineSusceptanceMillisiemens(line) * (line.voltageKv / Math.sqrt(3));
}

/** The charging current that one end supplies, amperes rms: half of the total in the π model of a line. */
export function chargingAmpsPerEnd(line: ChargedLine): number {
  return chargingAmps(line) / 2;
}

/** Total three-phase reactive power that the line's capacitance supplies, megavolt-amperes. */
export function chargingMva(line: ChargedLine): number {
  const susceptanceSiemens = (line.susceptanceMicrosiemensPerKm * line.lengthKm) / 1e6;
  return susceptanceSiemens * line.voltageKv ** 2;
}
