import type { Measurement } from '../../contract/feed';
import type { ReplaySettings } from '../../contract/replay';
import { judgedSnapshot, type Unevaluable } from '../../ingest/computed-snapshot';
import { rosterLine, versionInForce, type RosterLine } from '../../ingest/roster';
import { perPhase } from '../../protection/phase';
import { unpackMeasurements } from '../../store/packing';
import type { PackedSnapshot } from '../../store/packed-snapshots';
import type { RegisteredLine } from '../../store/register';
import { listed } from '../../view/line-words';
import { judgedPoint } from './judged-point';
import type { Judged, JudgedSnapshot } from './tally';

export type RowJudged = JudgedSnapshot | { readonly atMs: number; readonly underTest: true };

/**
 * Judges raw rows of a line twice by the worker's own evaluation: by the version in force at each row's instant,
 * and by the settings tried as if they had been in force all along. The line's terminals are those of the register
 * today, as for every later correction of a row. `frequencyHz` is the system's nominal one.
 */
export function createJudge(
  line: RegisteredLine,
  { settings, frequencyHz }: { settings: ReplaySettings; frequencyHz: number },
): (row: PackedSnapshot) => RowJudged {
  const asRecorded = rosterLine(line, frequencyHz);
  // its obstacle is that of a line with these settings: one that has none recorded can still be tried
  const asTried = rosterLine({ ...line, settings: [triedVersion(settings)] }, frequencyHz);
  const keyOf = new Map([...line.terminalIds].map(([key, id]) => [id, key]));
  const reasonOf = createReasons(line);
  return ({ at, phasors }) => {
    const atMs = at.getTime();
    const measurements = measurementsOf(unpackMeasurements(phasors, at), keyOf);
    if (asRecorded.expected.some((key) => measurements.get(key)?.test)) return { atMs, underTest: true };
    const notThere = missingQuantity(asRecorded, measurements);
    if (notThere !== undefined) return { atMs, recorded: notThere, replayed: notThere };
    const judgedOn = (on: RosterLine): Judged => {
      const version = versionInForce(on, atMs);
      const { points, compensation, unevaluable } = judgedSnapshot(on, version, measurements);
      if (points === undefined) return { notComputable: reasonOf(unevaluable) };
      return {
        points: perPhase((phase) => judgedPoint(points[phase])),
        settingsVersion: on === asTried ? null : (version?.id ?? null),
        compensationFellBack: compensation === 'fallen back',
      };
    };
    return { atMs, recorded: judgedOn(asRecorded), replayed: judgedOn(asTried) };
  };
}

function triedVersion(settings: ReplaySettings): RegisteredLine['settings'][number] {
  const since = new Date(0).toISOString();
  return { ...settings, id: 0, validFrom: since, note: '', recordedBy: '', recordedAt: since };
}

function measurementsOf(
  packed: ReturnType<typeof unpackMeasurements>,
  keyOf: ReadonlyMap<number, string>,
): Map<string, Measurement> {
  const found = new Map<string, Measurement>();
  for (const { terminalId, measurement } of packed) {
    const key = keyOf.get(terminalId);
    // of a terminal that the register holds no longer
    if (key !== undefined) found.set(key, measurement);
  }
  return found;
}

/** A row of before the line's feed was changed holds the other kind of quantity. */
function missingQuantity(
  line: RosterLine,
  measurements: ReadonlyMap<string, Measurement>,
): { readonly notComputable: string } | undefined {
  const lacks = ({ current, reported }: Measurement): boolean =>
    line.goesBy === 'phasors' ? current === undefined : reported === undefined;
  const lacking = line.expected.some((key) => {
    const measurement = measurements.get(key);
    return measurement !== undefined && lacks(measurement);
  });
  if (!lacking) return undefined;
  const kind = line.goesBy === 'phasors' ? 'phasors' : 'reported magnitudes';
  return { notComputable: `The stored message holds no ${kind}, which this line goes by today.` };
}

/** Why a snapshot was not evaluated, in words; the same sentence for the same reason, so that they can be counted. */
function createReasons(line: RegisteredLine): (unevaluable: Unevaluable | undefined) => string {
  const name = new Map(line.terminals.map(({ key, substationName }) => [key, substationName]));
  const ends = (keys: readonly string[]) => listed(keys.map((key) => name.get(key) ?? key));
  return (unevaluable) => {
    if (unevaluable === undefined) return 'The differential cannot be computed.';
    if (unevaluable.by === 'register') return unevaluable.reason;
    const { cause } = unevaluable;
    switch (cause.basis) {
      case 'terminal silent':
        return `Nothing was heard of ${ends(cause.terminals)}.`;
      case 'validity':
        return `Marked invalid by ${ends(cause.terminals)}.`;
      case 'clock':
        return `No common time at ${ends(cause.terminals)}.`;
      default:
        return 'The differential cannot be computed.';
    }
  };
}
