import type { Complex, Three } from './complex';
import { eachPhase, polar } from './complex';
import { hashed, seedOf, smoothNoise } from './noise';

const MINUTE_MS = 60_000;
const THIRD_RAD = (2 * Math.PI) / 3;
const NOMINAL_HZ = 50;

/** A substation's busbar at one voltage: what every line that starts there sees. */
export type Busbar = {
  readonly phaseVolts: number;
  readonly seed: number;
  readonly meanAngleRad: number;
  readonly levels: Three<number>;
};

/** Busbars of one substation and voltage are the same for every line of a seed. */
export function busbarOf(
  seed: number,
  { substation, voltageKv }: { substation: string; voltageKv: number },
): Busbar {
  const own = seedOf(seed, `${substation}/${voltageKv}`);
  return {
    phaseVolts: (voltageKv * 1000) / Math.sqrt(3),
    seed: own,
    meanAngleRad: (hashed(own, 1) - 0.5) * 0.3,
    levels: eachPhase((phase) => 1.005 + (hashed(own, 10 + phase) - 0.5) * 0.006),
  };
}

/** Phase-to-earth voltages, volts rms, in the network's common time reference. */
export function busbarVolts(busbar: Busbar, atMs: number): Three<Complex> {
  const minutes = atMs / MINUTE_MS;
  const level =
    busbar.phaseVolts *
    (1 +
      0.004 * smoothNoise(busbar.seed, minutes / 190) +
      0.0012 * smoothNoise(busbar.seed ^ 1, minutes / 12));
  const angleRad = busbar.meanAngleRad + 0.03 * smoothNoise(busbar.seed ^ 2, minutes / 45);
  return eachPhase((phase) => polar(level * busbar.levels[phase], angleRad - phase * THIRD_RAD));
}

/** One frequency for the whole network, hertz. */
export function networkHz(seed: number, atMs: number): number {
  const minutes = atMs / MINUTE_MS;
  return NOMINAL_HZ + 0.022 * smoothNoise(seed, minutes / 7) + 0.008 * smoothNoise(seed ^ 1, minutes * 3);
}
