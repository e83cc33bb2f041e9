import type { Measurement } from '../contract/feed';
import type { WarningCause } from '../contract/warning';
import {
  operatingPoint,
  operatingPointFromReported,
  throughAmps,
  type OperatingPoint,
  type Scheme,
} from '../protection/evaluation';
import { perPhase, PHASES, type PerPhase } from '../protection/phase';
import { phasorFromPolar, type Phasor } from '../protection/phasor';
import { packFlags } from '../store/snapshot-flags';
import { isComplete } from './alignment';
import { versionInForce, type RosterLine, type SchemeVersion } from './roster';

/** Why a snapshot has no differential: something of the feed, or something of the register. */
export type Unevaluable = { by: 'feed'; cause: WarningCause } | { by: 'register'; reason: string };

export interface ComputedSnapshot {
  readonly line: RosterLine;
  readonly atMs: number;
  readonly measurements: ReadonlyMap<string, Measurement>;
  readonly version: SchemeVersion | undefined;
  readonly points: PerPhase<OperatingPoint> | undefined;
  readonly unevaluable: Unevaluable | undefined;
  /** mean of the phases, amperes */
  readonly throughAmps: number | undefined;
  readonly flags: number;
}

/** Computes one instant of a line from what its terminals sent. */
export function computedSnapshot(
  {
    line,
    atMs,
    measurements,
  }: { line: RosterLine; atMs: number; measurements: ReadonlyMap<string, Measurement> },
  clockLimitUs: number,
): ComputedSnapshot {
  const version = versionInForce(line, atMs);
  const unevaluable = feedObstacle(line, measurements) ?? registerObstacle(line, version);
  const points = unevaluable === undefined ? operatingPoints(line, version!.scheme, measurements) : undefined;
  const through = isComplete(line, measurements) ? meanThroughAmps(line, measurements) : undefined;
  return {
    line,
    atMs,
    measurements,
    version,
    points,
    unevaluable,
    throughAmps: through,
    flags: snapshotFlags({ line, measurements, clockLimitUs, notEvaluated: unevaluable !== undefined }),
  };
}

function feedObstacle(
  line: RosterLine,
  measurements: ReadonlyMap<string, Measurement>,
): Unevaluable | undefined {
  const missing = line.expected.filter((terminal) => !measurements.has(terminal));
  if (missing.length > 0) return { by: 'feed', cause: { basis: 'terminal silent', terminals: missing } };
  const those = (is: (measurement: Measurement) => boolean) =>
    line.expected.filter((terminal) => is(measurements.get(terminal)!));
  const invalid = those(({ validity }) => validity === 'invalid');
  if (invalid.length > 0) return { by: 'feed', cause: { basis: 'validity', terminals: invalid } };
  // phasors without a common time reference add up to anything; magnitudes that a terminal computed itself do not need one
  const free = line.goesBy === 'phasors' ? those(({ clock }) => clock.source === 'free') : [];
  if (free.length > 0) return { by: 'feed', cause: { basis: 'clock', terminals: free } };
  return undefined;
}

function registerObstacle(line: RosterLine, version: SchemeVersion | undefined): Unevaluable | undefined {
  if (line.obstacle !== undefined) return { by: 'register', reason: line.obstacle };
  if (version === undefined) return { by: 'register', reason: 'No settings were in force at this instant.' };
  return undefined;
}

const DEGREES = Math.PI / 180;

/** The currents of one phase at every expected terminal, amperes. */
function currentsOf(
  line: RosterLine,
  measurements: ReadonlyMap<string, Measurement>,
  phase: 'a' | 'b' | 'c',
): Phasor[] {
  return line.expected.map((terminal) => {
    const [amps, degrees] = measurements.get(terminal)!.current![phase];
    return phasorFromPolar(amps, degrees * DEGREES);
  });
}

function operatingPoints(
  line: RosterLine,
  scheme: Scheme,
  measurements: ReadonlyMap<string, Measurement>,
): PerPhase<OperatingPoint> {
  if (line.goesBy === 'phasors')
    return perPhase((phase) => operatingPoint(scheme, currentsOf(line, measurements, phase)));
  const reported = measurements.get(line.expected[0]!)!.reported!;
  return perPhase((phase) => {
    const index = PHASES.indexOf(phase);
    return operatingPointFromReported(scheme, {
      differentialAmps: reported.differential[index]!,
      restraintAmps: reported.restraint[index]!,
    });
  });
}

function meanThroughAmps(
  line: RosterLine,
  measurements: ReadonlyMap<string, Measurement>,
): number | undefined {
  if (line.expected.some((terminal) => measurements.get(terminal)!.current === undefined)) {
    // reported magnitudes alone: with a restraint of half the sum this is the through current itself
    const reported = measurements.get(line.expected[0]!)!.reported;
    return reported && mean(reported.restraint);
  }
  return mean(PHASES.map((phase) => throughAmps(currentsOf(line, measurements, phase))));
}

const mean = (values: readonly number[]): number =>
  values.reduce((total, value) => total + value, 0) / values.length;

function snapshotFlags({
  line,
  measurements,
  clockLimitUs,
  notEvaluated,
}: {
  line: RosterLine;
  measurements: ReadonlyMap<string, Measurement>;
  clockLimitUs: number;
  notEvaluated: boolean;
}): number {
  const sent = [...measurements.values()];
  return packFlags({
    incomplete: !isComplete(line, measurements),
    validityNotGood: sent.some(({ validity }) => validity !== 'good'),
    validityInvalid: sent.some(({ validity }) => validity === 'invalid'),
    test: sent.some(({ test }) => test),
    clockBeyondLimit: sent.some(({ clock }) => clock.source === 'free' || clock.error_us > clockLimitUs),
    breakerOpen: sent.some(({ breaker }) => breaker === 'open'),
    notEvaluated,
  });
}

export const allBreakersOpen = (snapshot: Pick<ComputedSnapshot, 'measurements'>): boolean =>
  snapshot.measurements.size > 0 &&
  [...snapshot.measurements.values()].every(({ breaker }) => breaker === 'open');
