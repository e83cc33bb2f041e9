import type { LevelRow } from '../../src/store/levels';

/** A level row that stands at one value, with what a test changes. */
export function levelRow(
  place: Pick<LevelRow, 'lineId' | 'phase' | 'start'>,
  medianAmps: number | null,
  change: Partial<LevelRow> = {},
): LevelRow {
  return {
    ...place,
    leastAmps: medianAmps,
    p05Amps: medianAmps,
    medianAmps,
    p95Amps: medianAmps,
    greatestAmps: medianAmps,
    meanRestraintAmps: null,
    meanThroughAmps: null,
    greatestUtilisation: null,
    qualifiedCount: 1,
    allCount: 1,
    disqualified: null,
    sums: null,
    channelPath: null,
    ...change,
  };
}
