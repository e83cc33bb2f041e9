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
  const through = isComplete(line, measurements)
    ? meanThroughAmps(line, { measurements, scheme: version?.scheme })
    : undefined;
  return {
    line,
    atMs,
    measurements,
    version,
    points,
    unevaluable,
    throughAmps: through,
    flags: snapshotFlags({ line, measurements, clockLimitUs, notEvaluated: unevaluable?.by === 'register' }),
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
  { measurements, scheme }: { measurements: ReadonlyMap<string, Measurement>; scheme: Scheme | undefined },
): number | undefined {
  if (line.goesBy === 'phasors')
    return mean(PHASES.map((phase) => throughAmps(currentsOf(line, measurements, phase))));
  // one terminal's own phasor says nothing of the others: the through current is what its restraint was formed from
  const restraintAmps = mean(measurements.get(line.expected[0]!)!.reported!.restraint);
  return scheme && throughAmpsFromRestraint(scheme.restraint, restraintAmps);
}

/** Half the sum of the magnitudes where the convention tells it; else the greatest, which of two terminals is as good. */
function throughAmpsFromRestraint(restraint: Scheme['restraint'], restraintAmps: number): number {
  switch (restraint.kind) {
    case 'scaled-sum':
      return restraintAmps / (2 * restraint.factor);
    case 'maximum':
      return restraintAmps;
  }
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
  const sent = expectedMeasurements(line, measurements);
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

/**
 * What the terminals sent by which the line is judged. Whether another one's word, of a terminal out of service, is
 * there as well depends on who came first, and so must not count.
 */
const expectedMeasurements = (
  line: RosterLine,
  measurements: ReadonlyMap<string, Measurement>,
): Measurement[] => line.expected.flatMap((terminal) => measurements.get(terminal) ?? []);

export function allBreakersOpen({ line, measurements }: ComputedSnapshot): boolean {
  const sent = expectedMeasurements(line, measurements);
  return sent.length > 0 && sent.every(({ breaker }) => breaker === 'open');
}

export const isUnderTest = ({ line, measurements }: ComputedSnapshot): boolean =>
  expectedMeasurements(line, measurements).some(({ test }) => test);
