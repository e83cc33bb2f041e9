import type { Measurement } from '../../src/contract/feed';
import type { RegisterLine } from '../../src/contract/register';
import { judgedSnapshot } from '../../src/ingest/computed-snapshot';
import { rosterLine } from '../../src/ingest/roster';
import { demoLines } from '../../simulator/network/demo-lines';
import { createDemoMeasurements } from '../../simulator/demo-history';

/** Snapshots a second through the full evaluation on one core, for lines of the demo network that stand for a kind each. */

const CASES: readonly (readonly [what: string, line: string])[] = [
  ['two-slope, two terminals', 'skelder-low-pell-1'],
  ['two-slope, three terminals', 'tarn-head-fennick-quillby'],
  ['adaptive, two terminals', 'ostrel-tarn-head'],
  ['alpha plane, two terminals', 'skelder-tarn-head'],
  ['alpha plane, three terminals', 'hask-low-pell-brindle'],
  ['phase comparison, two terminals', 'fennick-ostrel'],
  ['two-slope with compensated charging', 'skelder-hask'],
  ['two-slope with a transformer in the zone', 'tarn-head-fennick'],
];
const AT_MS = Date.UTC(2026, 2, 2, 10);
const SNAPSHOTS = 2_000;
const ROUNDS = 60;
const WARM_UP_ROUNDS = 10;

export function printEvaluationRates(): void {
  const feed = createDemoMeasurements({ seed: 1, epochMs: AT_MS });
  for (const [what, key] of CASES) {
    const { line, version } = registered(key);
    const snapshots = Array.from(
      { length: SNAPSHOTS },
      (_, index) =>
        new Map<string, Measurement>(
          feed(key, AT_MS + index * 2_000).map(({ terminal, measurement }) => [terminal, measurement]),
        ),
    ).filter((sent) => sent.size === line.expected.length);
    let sink = 0;
    const round = () => {
      for (const sent of snapshots) sink += judgedSnapshot(line, version, sent).points?.a.utilisation ?? 0;
    };
    for (let warm = 0; warm < WARM_UP_ROUNDS; warm += 1) round();
    const begun = performance.now();
    for (let times = 0; times < ROUNDS; times += 1) round();
    const perSecond = (snapshots.length * ROUNDS * 1000) / (performance.now() - begun);
    if (!(sink > 0)) throw new Error(`${key} was not evaluated.`);
    console.log(`${what.padEnd(42)} ${(perSecond / 1000).toFixed(0).padStart(6)} k snapshots/s`);
  }
}

function registered(key: string) {
  const { terminals, settings, ...facts } = demoLines.find((line) => line.key === key)!;
  const line: RegisterLine = {
    ...facts,
    terminals: terminals.map((terminal, position) => ({ ...terminal, position })),
    settings: settings.map((version, index) => ({
      ...version,
      id: index + 1,
      recordedBy: 'bench',
      recordedAt: version.validFrom,
    })),
  };
  const terminalIds = new Map(terminals.map(({ key: terminal }, index) => [terminal, index + 1]));
  const roster = rosterLine({ ...line, id: 1, terminalIds }, 50);
  return { line: roster, version: roster.versions.at(-1) };
}
