import { describe, expect, it } from 'vitest';
import { rungRows, rungStart } from '../../../src/ingest/rungs/rung';
import { packFlags, type SnapshotFlag } from '../../../src/store/snapshot-flags';
import type { SnapshotFigures } from '../../../src/store/snapshots';
import { seededRandom } from '../../protection/seeded-random';

const START = new Date('2026-03-02T10:00:00.000Z');
const WINDOW = { lineId: 7, start: START, ratingAmps: 1000 };
const PERIOD_MS = 2_000;

/** The raw row of period n of the window: phase b stands 1 A above phase a, phase c 2 A. */
function row(period: number, differentialAmps: number | null, change: Partial<SnapshotFigures> = {}) {
  const three = <T>(of: (above: number) => T) => [of(0), of(1), of(2)] as const;
  const [dA, dB, dC] = three((above) => differentialAmps && differentialAmps + above);
  const [uA, uB, uC] = three((above) => differentialAmps && (differentialAmps + above) / 120);
  const figures: SnapshotFigures = {
    lineId: 7,
    at: new Date(START.getTime() + period * PERIOD_MS),
    flags: 0,
    differentialAAmps: dA,
    differentialBAmps: dB,
    differentialCAmps: dC,
    restraintAAmps: differentialAmps && 400,
    restraintBAmps: differentialAmps && 410,
    restraintCAmps: differentialAmps && 420,
    thresholdAAmps: differentialAmps && 120,
    thresholdBAmps: differentialAmps && 123,
    thresholdCAmps: differentialAmps && 126,
    utilisationA: uA,
    utilisationB: uB,
    utilisationC: uC,
    throughAmps: 400,
    settingRecordId: 1,
  };
  return { ...figures, ...change };
}
const flagged = (flag: SnapshotFlag): Partial<SnapshotFigures> => ({ flags: packFlags({ [flag]: true }) });
const BEFORE = row(-1, 9);

describe('the level rows of a window', () => {
  it('say of each phase how its differential current was spread', () => {
    const [a, b, c] = rungRows(
      WINDOW,
      [1, 2, 3, 4, 5].map((amps, period) => row(period, amps)),
      BEFORE,
    );
    expect(a).toEqual({
      lineId: 7,
      phase: 'a',
      start: START,
      leastAmps: 1,
      p05Amps: expect.closeTo(1.2, 9) as number,
      medianAmps: 3,
      p95Amps: expect.closeTo(4.8, 9) as number,
      greatestAmps: 5,
      meanRestraintAmps: 400,
      meanThroughAmps: 400,
      greatestUtilisation: 5 / 120,
      qualifiedCount: 5,
      allCount: 5,
      disqualified: {},
      sums: null,
      channelPath: null,
    });
    expect([b?.medianAmps, b?.meanRestraintAmps]).toEqual([4, 410]);
    expect([c?.medianAmps, c?.greatestUtilisation]).toEqual([5, 7 / 120]);
  });

  it('are the same numbers from the same rows, however often they are built', () => {
    const random = seededRandom(24);
    const rows = Array.from({ length: 1_800 }, (_, period) =>
      row(period, 10 + random(), { throughAmps: 400 + 50 * random(), flags: random() < 0.1 ? 1 : 0 }),
    );
    const first = rungRows(WINDOW, rows, BEFORE);
    expect(first[0]?.qualifiedCount).toBeGreaterThan(1_500);
    expect(rungRows(WINDOW, [...rows], BEFORE)).toEqual(first);
  });

  it('spread the same levels the same way, in whatever order of time they came', () => {
    const levels = [4, 19, 7, 7, 11, 3, 30, 16, 8, 5];
    const built = (amps: readonly number[]) =>
      rungRows(
        WINDOW,
        amps.map((level, period) => row(period, level)),
        BEFORE,
      );
    expect(built(levels.toSorted((a, b) => a - b))).toEqual(built(levels));
    expect(built(levels.toReversed())).toEqual(built(levels));
  });

  it.each(['incomplete', 'validityNotGood', 'test', 'clockBeyondLimit', 'breakerOpen'] as const)(
    'count a snapshot that is flagged %s, and take no level from it',
    (flag) => {
      const [a] = rungRows(WINDOW, [row(0, 10), row(1, 90, flagged(flag)), row(2, 12)], BEFORE);
      expect(a).toMatchObject({ allCount: 3, qualifiedCount: 2, greatestAmps: 12 });
    },
  );

  it.each([
    ['below 2 % of the rating', 19.9],
    ['above 120 % of the rating', 1200.1],
  ])('take no level from a load %s', (_, throughAmps) => {
    const steady = { throughAmps };
    const rows = [row(0, 10, steady), row(1, 11, steady)];
    expect(rungRows(WINDOW, rows, row(-1, 9, steady))[0]).toMatchObject({ allCount: 2, qualifiedCount: 0 });
  });

  it('take no level from a load that has just changed by a fifth of the rating', () => {
    const rows = [row(0, 10), row(1, 11, { throughAmps: 600 }), row(2, 12, { throughAmps: 600 })];
    expect(rungRows(WINDOW, rows, BEFORE)[0]).toMatchObject({ qualifiedCount: 2, greatestAmps: 12 });
  });

  it('judge the first snapshot’s steadiness by the row before the window, and do not count it without one', () => {
    expect(rungRows(WINDOW, [row(0, 10)], BEFORE)[0]?.qualifiedCount).toBe(1);
    expect(rungRows(WINDOW, [row(0, 10)], row(-1, 9, { throughAmps: 700 }))[0]?.qualifiedCount).toBe(0);
    expect(rungRows(WINDOW, [row(0, 10)], undefined)[0]?.qualifiedCount).toBe(0);
  });

  it('hold the greatest utilisation there was, of unqualified moments as well', () => {
    const [a] = rungRows(WINDOW, [row(0, 10), row(1, 96, flagged('test')), row(2, 12)], BEFORE);
    expect(a).toMatchObject({ greatestUtilisation: 0.8, greatestAmps: 12 });
  });

  it('without a qualified snapshot are null, never 0', () => {
    const rows = [row(0, null, flagged('incomplete')), row(1, null, flagged('incomplete'))];
    for (const built of rungRows(WINDOW, rows, BEFORE))
      expect(built).toMatchObject({
        leastAmps: null,
        p05Amps: null,
        medianAmps: null,
        p95Amps: null,
        greatestAmps: null,
        meanRestraintAmps: null,
        meanThroughAmps: null,
        greatestUtilisation: null,
        qualifiedCount: 0,
        allCount: 2,
      });
  });

  it('take no level from a line that is not evaluated, though its load is ordinary', () => {
    expect(rungRows(WINDOW, [row(0, null, flagged('notEvaluated'))], BEFORE)[0]).toMatchObject({
      medianAmps: null,
      qualifiedCount: 0,
      allCount: 1,
    });
  });
});

describe('the start of a window', () => {
  it.each([
    ['hour', '2026-03-29T01:59:59.999Z', '2026-03-29T01:00:00.000Z'],
    ['hour', '2026-03-29T02:00:00.000Z', '2026-03-29T02:00:00.000Z'],
    // the clocks of the test's own time zone are put forward on this day; the rows go by UTC
    ['day', '2026-03-29T23:59:59.999Z', '2026-03-29T00:00:00.000Z'],
  ] as const)('of one %s goes by UTC: %s', (rung, at, start) => {
    expect(new Date(rungStart(rung, Date.parse(at))).toISOString()).toBe(start);
  });
});
