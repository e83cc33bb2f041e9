import { expect, test } from 'vitest';
import { currentSquares } from '../../../src/standing/composition-sums';
import type { CompositionSums } from '../../../src/standing/composition-sums';
import type { DailyLevel } from '../../../src/standing/creep';
import { median } from '../../../src/standing/quantile';
import { firstCreepDay, LEARNING_DAYS, type Looks, looksAt, looksAtLoad } from './creep-looks';
import { daySumsOf, reportedHour } from './line-sums';
import { drawnTruth, measuredHours, uniform } from './seeded-line';
import type { MeasuredHour } from './seeded-line';

const LINES = 40;
const DAYS = 730;
const TRIAL_MS = 120_000;

/** The mismatch of the currents alone, charging and all, at the typical current of the first two months. */
function lumpedLevels(days: readonly CompositionSums[]): DailyLevel[] {
  const rms = (sums: CompositionSums) => Math.sqrt(currentSquares(sums, 1) / sums.values[3]!);
  const amps = median(days.slice(0, LEARNING_DAYS).map(rms))!;
  return days.map((sums, day) => {
    const product = Math.hypot(sums.values[8]!, sums.values[9]!);
    return { day, levelAmps: (amps * product) / currentSquares(sums, 1) };
  });
}

const byMagnitudes = (measured: readonly MeasuredHour[]): Looks =>
  looksAtLoad(measured.map((each) => reportedHour(each, 'half the sum')));

const CASES: readonly {
  readonly name: string;
  readonly daySwing: number;
  readonly looksOf: (measured: readonly MeasuredHour[]) => Looks;
}[] = [
  { name: 'magnitudes at one load, ordinary days', daySwing: 0.3, looksOf: byMagnitudes },
  { name: 'magnitudes at one load, days a third as varied', daySwing: 0.1, looksOf: byMagnitudes },
  { name: 'magnitudes at one load, days nearly without change', daySwing: 0.02, looksOf: byMagnitudes },
  {
    name: 'a mismatch of the currents that holds the charging',
    daySwing: 0.3,
    looksOf: (measured) => looksAt(lumpedLevels(daySumsOf(measured, { hasVoltage: false }))),
  },
];

test(
  'with magnitudes alone levels come to one load where load varies from day to day, and nothing is said where it does not',
  () => {
    const table = CASES.map(({ name, daySwing, looksOf }) => {
      let [wrong, looksWithLevels, looksAtAll] = [0, 0, 0];
      for (let seed = 1; seed <= LINES; seed++) {
        const drawn = drawnTruth(seed, uniform(seed * 7919 + 3));
        const truth = { ...drawn, daySwing, seasonShare: 0.3, growthShareAYear: 0.1 };
        const measured = Array.from(measuredHours(truth, 24 * DAYS));
        const levels = measured
          .slice(0, 24 * LEARNING_DAYS)
          .map(({ differential: { re, im } }) => Math.hypot(re, im));
        const looks = looksOf(measured);
        const counted: Looks = (days) => {
          const found = looks(days);
          looksAtAll += 1;
          looksWithLevels += found === undefined ? 0 : 1;
          return found;
        };
        const pickupAmps = median(levels)! / (0.1 + 0.55 * uniform(seed + 31)());
        const raised = firstCreepDay(counted, { pickupAmps, fromDay: 30, toDay: DAYS, everyDays: 28 });
        if (raised !== undefined) wrong++;
      }
      return { levels: name, lines: LINES, judged: looksWithLevels / looksAtAll, wrong };
    });
    console.table(table);
    const [ordinary, third, none, lumped] = table;
    for (const { judged, wrong } of [ordinary!, third!]) {
      expect(judged).toBeGreaterThan(0.95);
      expect(wrong).toBe(0);
    }
    expect(none!.judged).toBe(0);
    // the reason why magnitudes are taken even where there are phasors, as long as there is no voltage
    expect(lumped!.wrong).toBeGreaterThan(ordinary!.wrong);
  },
  TRIAL_MS,
);
