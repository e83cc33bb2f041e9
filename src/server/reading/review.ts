import type { ReviewCloud } from '../../contract/review';
import type { SettingsVersion } from '../../contract/settings-version';
import { evaluation, isComputable } from '../../protection/evaluation';
import { perPhase, PHASES } from '../../protection/phase';
import { DEFAULT_QUALIFICATION_LIMITS, disqualifications } from '../../standing/qualification';
import { readLevels } from '../../store/levels';
import { readOperatingPoints, readPackedAt, type OperatingPointRow } from '../../store/operating-points';
import { unpackMeasurements } from '../../store/packing';
import { readRegisterLine, settingsInForce, type RegisteredLine } from '../../store/register';
import { readSnapshotBefore } from '../../store/snapshots';
import { snapshotFacts } from '../../view/snapshot-facts';
import { reviewScheme, terminalsInService, type ReviewLine } from '../../view/review-line';
import { NOT_FROM_MAGNITUDES, reviewSnapshot } from '../../view/review-now';
import { planeKind, reviewPlace } from '../../view/review-place';
import { terminalOnWire } from '../../view/terminal-on-wire';
import type { Site } from '../site';
import { createPlaces, type Places } from './review-grid';

/** Every bound of one cloud. */
export const REVIEW_LIMITS = {
  /** raw rows are read so much of the period at a time, so that others have their turn between */
  chunkMs: 6 * 3_600_000,
  /** packed snapshots that are computed anew at the most; more are thinned evenly */
  recomputedMost: 12_000,
  /** packed snapshots read at a time */
  packedAtOnce: 500,
} as const;

const DAY_MS = 86_400_000;

/** What a review needs of the register, and the load of the last day; undefined when the register lacks the line. */
export async function readReviewLine(site: Site, key: string): Promise<ReviewLine | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const nowMs = site.now();
  const hours = await readLevels(site.store, 'hour', {
    lineIds: [line.id],
    from: new Date(nowMs - DAY_MS),
    to: new Date(nowMs),
  });
  return reviewLine(line, {
    nominalFrequencyHz: site.settings.NOMINAL_FREQUENCY_HZ,
    dayThroughAmps: weightedMean(hours),
  });
}

function reviewLine(
  line: RegisteredLine,
  known: Pick<ReviewLine, 'nominalFrequencyHz' | 'dayThroughAmps'>,
): ReviewLine {
  const { id: _id, terminalIds: _terminalIds, settings: _settings, ...register } = line;
  return { ...register, ...known };
}

function weightedMean(
  rows: readonly { meanThroughAmps: number | null; qualifiedCount: number }[],
): number | null {
  const known = rows.filter((row) => row.meanThroughAmps !== null && row.qualifiedCount > 0);
  const weight = known.reduce((total, row) => total + row.qualifiedCount, 0);
  if (weight === 0) return null;
  return known.reduce((total, row) => total + row.meanThroughAmps! * row.qualifiedCount, 0) / weight;
}

interface Window {
  readonly from: Date;
  readonly to: Date;
  readonly recomputedMost?: number;
}

/** Where the qualified snapshots of a period lie under the conventions in force at its end. */
export async function readReviewCloud(
  site: Site,
  key: string,
  window: Window,
): Promise<ReviewCloud | undefined> {
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return undefined;
  const version = settingsInForce(line.settings, window.to.getTime());
  const empty = emptyCloud(line, version, window);
  if (version === undefined)
    return { ...empty, reason: 'No settings were in force at the end of this period.' };
  const plane = planeKind(version.characteristic.kind);
  if (plane !== 'restraint' && line.goesBy === 'reported') return { ...empty, reason: NOT_FROM_MAGNITUDES };
  const places = createPlaces();
  const seen = await readQualified(site, line, {
    window,
    take: plane === 'restraint' ? restraintTaker(places, comparableVersions(line, version)) : () => true,
  });
  const everyNth =
    plane === 'restraint'
      ? 1
      : thinning(seen.instantsMs.length, window.recomputedMost ?? REVIEW_LIMITS.recomputedMost);
  const counted =
    plane === 'restraint'
      ? seen.qualifiedCount - seen.otherConventionCount
      : await recompute(site, line, {
          version,
          places,
          instantsMs: seen.instantsMs.filter((_, index) => index % everyNth === 0),
        });
  return {
    ...empty,
    plane,
    snapshotCount: seen.snapshotCount,
    qualifiedCount: seen.qualifiedCount,
    otherConventionCount: seen.otherConventionCount,
    everyNth,
    countedCount: counted,
    reason: counted > 0 ? null : emptyReason(seen),
    ...places.grid(),
  };
}

function emptyCloud(
  { key }: RegisteredLine,
  version: SettingsVersion | undefined,
  { from, to }: Window,
): ReviewCloud {
  return {
    line: key,
    from: from.toISOString(),
    to: to.toISOString(),
    settingsVersion: version?.id ?? null,
    plane: version === undefined ? null : planeKind(version.characteristic.kind),
    reason: null,
    snapshotCount: 0,
    qualifiedCount: 0,
    otherConventionCount: 0,
    everyNth: 1,
    countedCount: 0,
    x: null,
    y: null,
    cells: perPhase(() => []),
  };
}

interface Qualified {
  snapshotCount: number;
  qualifiedCount: number;
  otherConventionCount: number;
  readonly instantsMs: number[];
}

function emptyReason({ snapshotCount, qualifiedCount }: Qualified): string {
  if (snapshotCount === 0) return 'No snapshot of this period is in the raw store.';
  if (qualifiedCount === 0) return 'No snapshot of this period qualified.';
  return 'None of the qualified snapshots could be placed under the conventions in force.';
}

/** Goes through the raw rows piece by piece; `take` says whether a qualified row is of this convention. */
async function readQualified(
  site: Site,
  line: RegisteredLine,
  { window, take }: { window: Window; take: (row: OperatingPointRow) => boolean },
): Promise<Qualified> {
  const seen: Qualified = { snapshotCount: 0, qualifiedCount: 0, otherConventionCount: 0, instantsMs: [] };
  const before = await readSnapshotBefore(site.store, line.id, window.from);
  let previous = before && snapshotFacts(before);
  const limits = { ratingAmps: line.ratingAmps, limits: DEFAULT_QUALIFICATION_LIMITS };
  for (let from = window.from.getTime(); from < window.to.getTime(); from += REVIEW_LIMITS.chunkMs) {
    const to = Math.min(from + REVIEW_LIMITS.chunkMs, window.to.getTime());
    const rows = await readOperatingPoints(site.store, line.id, { from: new Date(from), to: new Date(to) });
    seen.snapshotCount += rows.length;
    for (const row of rows) {
      const facts = snapshotFacts(row);
      const counts = disqualifications(facts, previous, limits).length === 0;
      previous = facts;
      if (!counts || row.differentialAAmps === null) continue;
      seen.qualifiedCount += 1;
      if (take(row)) seen.instantsMs.push(facts.atMs);
      else seen.otherConventionCount += 1;
    }
  }
  return seen;
}

/** Versions under which differential and restraint are formed as in this one, whatever their threshold. */
function comparableVersions(line: RegisteredLine, version: SettingsVersion): ReadonlySet<number> {
  const convention = ({ characteristic, restraint, chargingCompensation }: SettingsVersion) =>
    JSON.stringify([
      restraint,
      chargingCompensation,
      // the sum of errors is formed from the characteristic's own figures
      characteristic.kind === 'adaptive' ? characteristic : characteristic.kind,
    ]);
  const wanted = convention(version);
  return new Set(line.settings.filter((each) => convention(each) === wanted).map(({ id }) => id));
}

function restraintTaker(places: Places, versions: ReadonlySet<number>): (row: OperatingPointRow) => boolean {
  return (row) => {
    if (row.settingRecordId === null || !versions.has(row.settingRecordId)) return false;
    const points = {
      a: [row.restraintAAmps, row.differentialAAmps],
      b: [row.restraintBAmps, row.differentialBAmps],
      c: [row.restraintCAmps, row.differentialCAmps],
    } as const;
    for (const phase of PHASES) {
      const [x, y] = points[phase];
      if (x !== null && y !== null) places.add(phase, { x, y });
    }
    return true;
  };
}

const thinning = (count: number, most: number): number => Math.max(1, Math.ceil(count / most));

/** Places these instants by their packed phasors; returns how many could be. */
async function recompute(
  site: Site,
  line: RegisteredLine,
  {
    version,
    places,
    instantsMs,
  }: { version: SettingsVersion; places: Places; instantsMs: readonly number[] },
): Promise<number> {
  const known = reviewLine(line, {
    nominalFrequencyHz: site.settings.NOMINAL_FREQUENCY_HZ,
    dayThroughAmps: null,
  });
  const scheme = reviewScheme(known, version);
  const keys = terminalsInService(known);
  let counted = 0;
  for (let start = 0; start < instantsMs.length; start += REVIEW_LIMITS.packedAtOnce) {
    const some = instantsMs.slice(start, start + REVIEW_LIMITS.packedAtOnce);
    for (const { at, phasors } of await readPackedAt(site.store, line.id, some)) {
      const sent = new Map(
        unpackMeasurements(phasors, at).map(({ terminalId, measurement }) => [terminalId, measurement]),
      );
      const results = keys.map((key) => terminalOnWire(key, sent.get(line.terminalIds.get(key)!)));
      const snapshot = reviewSnapshot(known, version, results);
      if (!isComputable(snapshot)) continue;
      counted += 1;
      for (const phase of PHASES) {
        const { currents } = snapshot.zone[phase];
        const found = evaluation(scheme, currents, { frequencyHz: snapshot.frequencyHz });
        const place = isComputable(found) ? reviewPlace(found, currents) : undefined;
        if (place !== undefined) places.add(phase, place);
      }
    }
  }
  return counted;
}
