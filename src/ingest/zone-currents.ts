import type { CompensationOnWire } from '../contract/compensation';
import type { Measurement, PolarPerPhase } from '../contract/feed';
import { perPhase, PHASES, type PerPhase } from '../protection/phase';
import { phasorFromPolar, type Phasor } from '../protection/phasor';
import { type TerminalPhasors, type Zone, zonePhases } from '../protection/zone';

/** Each phase's currents as a scheme judges them, amperes primary on the line's side, in the order of the terminals. */
export interface ZoneCurrents {
  readonly phases: PerPhase<readonly Phasor[]>;
  readonly compensation: CompensationOnWire;
}

const DEGREES = Math.PI / 180;

/** The currents of a complete snapshot, with what lies in the zone taken out; as measured where nothing does. */
export function zoneCurrents(sent: readonly Measurement[], zone: Zone | undefined): ZoneCurrents {
  if (zone === undefined) return { phases: measuredCurrents(sent), compensation: 'none' };
  const phases = zonePhases(zone, sent.map(terminalPhasors));
  return { phases: perPhase((phase) => phases[phase].currents), compensation: worst(phases) };
}

/** The currents of each phase as the terminals sent them. */
function measuredCurrents(sent: readonly Measurement[]): PerPhase<Phasor[]> {
  return perPhase((phase) => sent.map(({ current }) => phasorOf(current!, phase)));
}

function terminalPhasors(measurement: Measurement): TerminalPhasors {
  const currents = perPhase((phase) => phasorOf(measurement.current!, phase));
  return { currents, voltagesKv: voltagePhasors(measurement) };
}

/** A terminal's voltages where it sent them and calls them good. */
export function voltagePhasors({ voltage, validity }: Measurement): PerPhase<Phasor> | undefined {
  if (voltage === undefined || validity !== 'good') return undefined;
  return perPhase((phase) => phasorOf(voltage, phase));
}

function phasorOf(polar: PolarPerPhase, phase: keyof PolarPerPhase): Phasor {
  const [magnitude, degrees] = polar[phase];
  return phasorFromPolar(magnitude, degrees * DEGREES);
}

/** One phase that fell back makes the snapshot one that did. */
function worst(phases: ReturnType<typeof zonePhases>): CompensationOnWire {
  const states = PHASES.map((phase) => phases[phase].compensation?.state);
  if (states.includes('fallback')) return 'fallen back';
  return states.includes('compensated') ? 'applied' : 'none';
}
