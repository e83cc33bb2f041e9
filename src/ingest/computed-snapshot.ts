import type { Measurement } from '../contract/feed';
import type { CompensationOnWire } from '../contract/compensation';
import type { WarningCause } from '../contract/warning';
import {
  type Evaluated,
  evaluation,
  evaluationFromReported,
  isComputable,
  throughAmps,
} from '../protection/evaluation';
import { perPhase, PHASES, type PerPhase } from '../protection/phase';
import type { Scheme } from '../protection/scheme';
import { packFlags } from '../store/snapshot-flags';
import { isComplete } from './alignment';
import { versionInForce, type RosterLine, type SchemeVersion } from './roster';
import { type ZoneCurrents, zoneCurrents } from './zone-currents';

/** Why a snapshot has no differential: something of the feed, or something of the register. */
export type Unevaluable = { by: 'feed'; cause: WarningCause } | { by: 'register'; reason: string };

export interface ComputedSnapshot {
  readonly line: RosterLine;
  readonly atMs: number;
  readonly measurements: ReadonlyMap<string, Measurement>;
  readonly version: SchemeVersion | undefined;
  readonly points: PerPhase<Evaluated> | undefined;
  readonly compensation: CompensationOnWire;
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
  const { currents, ...judged } = judgedSnapshot(line, version, measurements);
  return {
    line,
    atMs,
    measurements,
    version,
    ...judged,
    throughAmps: isComplete(line, measurements)
      ? meanThroughAmps(line, { version, measurements, currents })
      : undefined,
    flags: snapshotFlags({ line, measurements, clockLimitUs, ...judged }),
  };
}

type Judged = Pick<ComputedSnapshot, 'points' | 'compensation' | 'unevaluable'>;
/** Currents as the scheme judged them; undefined where it judged none. */
type Currents = ZoneCurrents['phases'] | undefined;

/** The three phases under a version of the settings, or why they can't be judged: also what a replay asks. */
export function judgedSnapshot(
  line: RosterLine,
  version: SchemeVersion | undefined,
  measurements: ReadonlyMap<string, Measurement>,
): Judged & { currents: Currents } {
  const unevaluable = feedObstacle(line, measurements) ?? registerObstacle(line, version);
  if (unevaluable !== undefined)
    return { points: undefined, compensation: 'none', unevaluable, currents: undefined };
  const { evaluations, compensation, currents } = evaluated(line, version!, measurements);
  const obstacle = PHASES.map((phase) => evaluations[phase]).find((point) => !isComputable(point));
  if (obstacle !== undefined && !isComputable(obstacle)) {
    const reason = obstacle.notComputable;
    return { points: undefined, compensation, unevaluable: { by: 'register', reason }, currents };
  }
  // every phase was just found to be computable
  return { points: evaluations as PerPhase<Evaluated>, compensation, unevaluable: undefined, currents };
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

function evaluated(line: RosterLine, version: SchemeVersion, measurements: ReadonlyMap<string, Measurement>) {
  const { scheme, zone, conditions } = version;
  if (line.goesBy === 'phasors') {
    const { phases, compensation } = zoneCurrents(expectedMeasurements(line, measurements), zone);
    const evaluations = perPhase((phase) => evaluation(scheme, phases[phase], conditions));
    return { evaluations, compensation, currents: phases };
  }
  const reported = measurements.get(line.expected[0]!)!.reported!;
  const evaluations = perPhase((phase) => {
    const index = PHASES.indexOf(phase);
    return evaluationFromReported(scheme, {
      differentialAmps: reported.differential[index]!,
      restraintAmps: reported.restraint[index]!,
    });
  });
  return { evaluations, compensation: 'none' as const, currents: undefined };
}

function meanThroughAmps(
  line: RosterLine,
  snapshot: {
    version: SchemeVersion | undefined;
    measurements: ReadonlyMap<string, Measurement>;
    currents: Currents;
  },
): number | undefined {
  const { version, measurements, currents } = snapshot;
  if (line.goesBy === 'phasors') {
    const sent = expectedMeasurements(line, measurements);
    // the charging belongs to the through current, and a transformer's two sides carry different ones: the line's counts
    const zone = version?.zone && { ...version.zone, charging: undefined };
    const isJudgedAlike = currents !== undefined && version?.zone?.charging === undefined;
    const phases = isJudgedAlike ? currents : zoneCurrents(sent, zone).phases;
    return mean(PHASES.map((phase) => throughAmps(phases[phase])));
  }
  // one terminal's own phasor says nothing of the others: the through current is what its restraint was formed from
  const restraintAmps = mean(measurements.get(line.expected[0]!)!.reported!.restraint);
  return version && throughAmpsFromRestraint(version.scheme.restraint, restraintAmps);
}

/** Half the sum of the magnitudes where the convention tells it; else the greatest, which of two terminals is as good. */
function throughAmpsFromRestraint(restraint: Scheme['restraint'], restraintAmps: number): number | undefined {
  switch (restraint.kind) {
    case 'scaled-sum':
      return restraintAmps / (2 * restraint.factor);
    case 'maximum':
      return restraintAmps;
    case 'error-sum':
    case 'none':
      return undefined;
  }
}

const mean = (values: readonly number[]): number =>
  values.reduce((total, value) => total + value, 0) / values.length;

function snapshotFlags({
  line,
  measurements,
  clockLimitUs,
  unevaluable,
  compensation,
}: {
  line: RosterLine;
  measurements: ReadonlyMap<string, Measurement>;
  clockLimitUs: number;
} & Judged): number {
  const sent = expectedMeasurements(line, measurements);
  return packFlags({
    incomplete: !isComplete(line, measurements),
    validityNotGood: sent.some(({ validity }) => validity !== 'good'),
    validityInvalid: sent.some(({ validity }) => validity === 'invalid'),
    test: sent.some(({ test }) => test),
    clockBeyondLimit: sent.some(({ clock }) => clock.source === 'free' || clock.error_us > clockLimitUs),
    breakerOpen: sent.some(({ breaker }) => breaker === 'open'),
    notEvaluated: unevaluable?.by === 'register',
    chargingCompensated: compensation === 'applied',
    compensationFellBack: compensation === 'fallen back',
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
