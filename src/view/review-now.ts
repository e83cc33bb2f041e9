import type { TerminalResult } from '../contract/result';
import type { SettingsVersion } from '../contract/settings-version';
import { evaluation } from '../protection/evaluation';
import type { Evaluation, NotComputable } from '../protection/evaluation';
import { perPhase } from '../protection/phase';
import type { PerPhase } from '../protection/phase';
import { angleRad, magnitude, phasorFromPolar } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';
import { sequenceDifferentials } from '../protection/sequence-differential';
import type { SequenceDifferential } from '../protection/sequence-differential';
import type { SequencePhasors } from '../protection/sequence';
import { zonePhases } from '../protection/zone';
import type { TerminalPhasors, ZonePhase } from '../protection/zone';
import { terminalName } from './line-words';
import { reviewScheme, reviewZone, terminalsInService } from './review-line';
import type { ReviewLine } from './review-line';

/** One snapshot as the recorded scheme sees it: each phase's currents on the line's side, in the terminals' order. */
export interface ReviewSnapshot {
  readonly terminals: readonly string[];
  readonly sent: readonly TerminalPhasors[];
  /** whether each terminal measures at the line's own voltage, not behind a transformer */
  readonly onLine: readonly boolean[];
  readonly zone: PerPhase<ZonePhase>;
  readonly frequencyHz: number;
}

/** Why a line by reported magnitudes has none of what needs phasors. */
export const NOT_FROM_MAGNITUDES =
  'This line goes by reported magnitudes: its feed holds what one terminal computed, so this can’t be told from this feed.';

/** Why such a line has no mismatch that is measured. */
export const FROM_MAGNITUDES_ALONE =
  'This line goes by reported magnitudes, by which the mismatches can’t be measured.';

type Recorded = Pick<SettingsVersion, 'characteristic' | 'restraint' | 'chargingCompensation'>;

const DEG = Math.PI / 180;

/** A snapshot brought into the zone of the line, or why that can't be done. */
export function reviewSnapshot(
  line: ReviewLine,
  recorded: Pick<Recorded, 'chargingCompensation'>,
  results: readonly TerminalResult[],
): ReviewSnapshot | NotComputable {
  if (line.goesBy === 'reported') return { notComputable: NOT_FROM_MAGNITUDES };
  const terminals = terminalsInService(line);
  if (terminals.length === 0) return { notComputable: 'The register holds no terminal in service.' };
  const found = terminals.map((key) => results.find((each) => each.key === key));
  const sent: TerminalPhasors[] = [];
  for (const [index, each] of found.entries()) {
    const name = terminalName(
      terminals[index]!,
      line.terminals.map(({ key, substationName }) => ({ key, name: substationName })),
    );
    const trouble = troubleOf(each);
    if (trouble !== undefined) return { notComputable: `${name} ${trouble}` };
    sent.push(phasorsOf(each!));
  }
  const zone = zonePhases(reviewZone(line, recorded), sent);
  const behind = line.inZoneTransformer?.otherTerminals ?? [];
  const onLine = terminals.map((key) => !behind.includes(key));
  return { terminals, sent, onLine, zone, frequencyHz: found[0]?.frequencyHz ?? line.nominalFrequencyHz };
}

function troubleOf(result: TerminalResult | undefined): string | undefined {
  if (result === undefined || !result.present || result.current === null)
    return 'has sent no currents for this instant.';
  if (result.validity === 'invalid') return 'marks its values as invalid.';
  if (result.clock?.source === 'free') return 'has lost its common time.';
  return undefined;
}

function phasorsOf({ current, voltage, validity }: TerminalResult): TerminalPhasors {
  const phasors = (polar: NonNullable<TerminalResult['current']>) =>
    perPhase((phase) => phasorFromPolar(polar[phase][0], polar[phase][1] * DEG));
  return {
    currents: phasors(current!),
    voltagesKv: voltage === null || validity !== 'good' ? undefined : phasors(voltage),
  };
}

/** Where the three phases of a snapshot stand under the recorded scheme. */
export function reviewPoints(
  line: ReviewLine,
  recorded: Recorded,
  { zone, frequencyHz }: ReviewSnapshot,
): PerPhase<Evaluation> {
  const scheme = reviewScheme(line, recorded);
  return perPhase((phase) => evaluation(scheme, zone[phase].currents, { frequencyHz }));
}

/** Zero-, positive- and negative-sequence differential of a snapshot on the line's side. */
export function reviewSequences(
  line: ReviewLine,
  recorded: Recorded,
  { terminals, zone, frequencyHz }: ReviewSnapshot,
): Readonly<Record<keyof SequencePhasors, SequenceDifferential>> {
  const currents = terminals.map((_, index) => perPhase((phase) => zone[phase].currents[index]!));
  return sequenceDifferentials(reviewScheme(line, recorded), currents, { frequencyHz });
}

/** The terminals with their currents as the scheme judges them: on the line's side, charging taken out where it is. */
export function terminalsOnLineSide(
  results: readonly TerminalResult[],
  { terminals, zone }: ReviewSnapshot,
): TerminalResult[] {
  return results.map((result) => {
    const index = terminals.indexOf(result.key);
    if (index < 0) return result;
    const polar = (phasor: Phasor): [number, number] => [magnitude(phasor), angleRad(phasor) / DEG];
    return { ...result, current: perPhase((phase) => polar(zone[phase].currents[index]!)) };
  });
}
