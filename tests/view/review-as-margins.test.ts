import { describe, expect, it } from 'vitest';
import { standingVerdictSchema } from '../../src/contract/standing';
import { isComputable } from '../../src/protection/evaluation';
import { PHASES } from '../../src/protection/phase';
import { reviewCompositions } from '../../src/view/review-composition';
import { reviewLoadability } from '../../src/view/review-margins';
import { lagFromAddress } from '../../src/view/review-number';
import type { LineHistory } from '../../src/ingest/verdict/line-history';
import type { RosterLine } from '../../src/ingest/roster';
import { packSums } from '../../src/store/composition-packing';
import { demoHistoryOf, demoRosterLine, verdictOf } from '../ingest/demo-history';
import { daysOf, teeSums } from '../standing/trials/line-sums';
import { drawnTee, teeHours } from '../standing/trials/seeded-tee';

const NOW_MS = Date.UTC(2026, 2, 2);
const DAY_MS = 86_400_000;
const MONTH = { nowMs: NOW_MS, epochMs: NOW_MS, days: 30, sampleMs: 600_000 } as const;

/** What the verdicts of a line say of emergency rating, and what its review makes of the same verdicts. */
function bothOf(line: RosterLine, history: LineHistory) {
  const standing = PHASES.map((phase) => verdictOf(line, history, phase));
  const recorded = line.register.settings.find(({ id }) => id === line.versions.at(-1)!.id)!;
  const load = reviewLoadability(
    {
      line: { ...line.register, nominalFrequencyHz: 50, dayThroughAmps: null },
      recorded,
      snapshot: { notComputable: 'There is none.' },
      // as the browser has it
      compositions: reviewCompositions(
        standingVerdictSchema.array().parse(JSON.parse(JSON.stringify(standing))),
      ),
    },
    { basis: 'composition', lagDeg: Number(lagFromAddress(null)) },
  );
  return standing.map(({ phase, emergencyUtilisation }) => {
    const own = load[phase];
    if (!isComputable(own)) throw new Error(own.notComputable);
    return { phase, inMargins: emergencyUtilisation, inReview: own.atEmergency.utilisation, from: own.from };
  });
}

function expectTheSame(phases: ReturnType<typeof bothOf>): void {
  for (const { phase, inMargins, inReview, from } of phases) {
    expect(from, phase).toBe('composition');
    expect(inMargins, phase).toBeGreaterThan(0);
    expect(inReview, phase).toBeCloseTo(inMargins!, 9);
  }
}

describe('utilisation at emergency rating', () => {
  it.each([
    ['of a two-slope scheme', 'skelder-low-pell-2'],
    ['of a long cable', 'hask-ostrel-cable'],
    ['with compensated charging', 'skelder-hask'],
    ['behind a transformer in the zone', 'tarn-head-fennick'],
    ['of an alpha plane', 'skelder-tarn-head'],
    ['of an adaptive scheme', 'ostrel-tarn-head'],
  ])('%s is the same in Review as in Margins', (_name, key) => {
    const line = demoRosterLine(key);
    expectTheSame(bothOf(line, demoHistoryOf(line, MONTH)));
  });

  it('of three terminals is the same in Review as in Margins', () => {
    const line = demoRosterLine('hask-low-pell-brindle');
    const history = demoHistoryOf(line, MONTH);
    // both branches of the demo's own lines follow one load, so that their mismatches can't be parted
    const sums = daysOf(Array.from(teeHours(drawnTee(1), 24 * MONTH.days), teeSums));
    const days = history.days.map((row) => {
      const day = Math.round((row.start.getTime() - NOW_MS) / DAY_MS) + MONTH.days;
      return { ...row, sums: packSums(sums[day]!) };
    });
    expectTheSame(bothOf(line, { ...history, days }));
  });
});
