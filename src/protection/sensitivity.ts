import { evaluation, isComputable } from './evaluation';
import type { NotComputable } from './evaluation';
import { firstCrossing } from './first-crossing';
import { phasorFromPolar, scale, sum } from './phasor';
import type { Phasor } from './phasor';
import type { Conditions, Scheme } from './scheme';

/** What an internal fault is laid over. */
export interface BeforeFault extends Conditions {
  /** the terminals' currents that go on to flow, amperes rms primary into the line */
  readonly currents: readonly Phasor[];
  /** nominal voltage, kilovolts rms phase to phase */
  readonly voltageKv: number;
  /** from where the fault is fed: by one terminal alone, whichever is worst, or by all with equal currents */
  readonly fedFrom: 'one end' | 'all ends';
}

/** The smallest internal fault that a scheme sees. */
export interface Sensitivity {
  /**
   * Least fault current that is seen whatever its angle to the load, amperes rms primary; undefined when there is
   * an angle at which even 63 kA are not seen.
   */
  readonly faultAmps: number | undefined;
  /** the angle of the fault current at which that is, radians, in the reference of the currents before the fault */
  readonly worstAngleRad: number;
  /** the terminal that feeds it, by its place among the currents; undefined when all do */
  readonly fedFromIndex: number | undefined;
  /** fault resistance at which that current flows, ohms: U/√3 over it, no impedance of sources or line */
  readonly faultResistanceOhm: number | undefined;
}

/** The greatest usual short-circuit rating of switchgear. */
const FAULT_AMPS_MOST = 63_000;
const FAULT_AMPS_LEAST = 0.1;
const GROWTH = 1.15;
const COARSE_RAD = Math.PI / 36;
const FINE_STEPS = 10;

/**
 * Sensitivity of a scheme: the least internal fault current at which it operates, at the worst angle between
 * fault and load and, with one infeed, the worst terminal. Fault currents add to what flowed before; that the
 * fault draws the voltage down and the load with it is left out. Angles are tried in steps of 5°, around the
 * worst in steps of ½°. Not computable where the scheme is not, and where it stands at its threshold already
 * without a fault.
 */
export function sensitivity(scheme: Scheme, before: BeforeFault): Sensitivity | NotComputable {
  const standing = evaluation(scheme, before.currents, before);
  if (!isComputable(standing)) return standing;
  if (standing.utilisation >= 1) {
    return { notComputable: 'The scheme already stands at its threshold, without any fault.' };
  }
  const worst = infeeds(before)
    .map((infeed) => worstAngle(infeed, (fault) => seenFrom(scheme, { before, infeed, fault })))
    .reduce((one, other) => (isWorse(other, one) ? other : one));
  const { faultAmps, angleRad, infeed } = worst;
  return {
    faultAmps,
    worstAngleRad: angleRad,
    fedFromIndex: infeed.index,
    faultResistanceOhm: faultAmps === undefined ? undefined : resistanceOhm(before.voltageKv, faultAmps),
  };
}

/** The fault resistance in ohms at which a current in amperes flows at a nominal voltage in kilovolts phase to phase. */
export function resistanceOhm(voltageKv: number, faultAmps: number): number {
  return (1000 * voltageKv) / (Math.sqrt(3) * faultAmps);
}

/** How a fault current divides over the terminals; `index` is the one that feeds it alone. */
interface Infeed {
  readonly shares: readonly number[];
  readonly index: number | undefined;
}

interface Found {
  readonly faultAmps: number | undefined;
  readonly angleRad: number;
  readonly infeed: Infeed;
}

function infeeds({ currents, fedFrom }: BeforeFault): readonly Infeed[] {
  if (fedFrom === 'all ends') {
    return [{ shares: currents.map(() => 1 / currents.length), index: undefined }];
  }
  return currents.map((_, index) => ({
    shares: currents.map((__, each) => (each === index ? 1 : 0)),
    index,
  }));
}

function worstAngle(infeed: Infeed, seenAmps: (angleRad: number) => number | undefined): Found {
  const at = (angleRad: number): Found => ({ faultAmps: seenAmps(angleRad), angleRad, infeed });
  const worstOf = (angles: readonly number[]) =>
    angles.map(at).reduce((one, other) => (isWorse(other, one) ? other : one));
  const coarse = worstOf(Array.from({ length: 72 }, (_, index) => index * COARSE_RAD));
  if (coarse.faultAmps === undefined) return coarse;
  const around = Array.from(
    { length: 2 * FINE_STEPS + 1 },
    (_, index) => coarse.angleRad + ((index - FINE_STEPS) * COARSE_RAD) / FINE_STEPS,
  );
  return worstOf(around);
}

const FAULT_GRID = faultGrid();

/** The least fault current at one angle that the scheme sees, amperes; `undefined` when none is. */
function seenFrom(
  scheme: Scheme,
  { before, infeed, fault }: { before: BeforeFault; infeed: Infeed; fault: number },
): number | undefined {
  return firstCrossing(FAULT_GRID, (amps) => {
    const current = phasorFromPolar(amps, fault);
    const currents = before.currents.map((each, index) =>
      sum([each, scale(current, infeed.shares[index] ?? 0)]),
    );
    const found = evaluation(scheme, currents, before);
    return isComputable(found) ? found.utilisation : NaN;
  });
}

function isWorse(one: Found, other: Found): boolean {
  return (one.faultAmps ?? Infinity) > (other.faultAmps ?? Infinity);
}

function faultGrid(): readonly number[] {
  const grid = [0];
  for (let amps = FAULT_AMPS_LEAST; amps < FAULT_AMPS_MOST; amps *= GROWTH) grid.push(amps);
  return [...grid, FAULT_AMPS_MOST];
}
