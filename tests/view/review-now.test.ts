import { describe, expect, it } from 'vitest';
import { isComputable } from '../../src/protection/evaluation';
import { broughtBy } from '../../src/view/review-line';
import {
  reviewPoints,
  reviewSequences,
  reviewSnapshot,
  terminalsOnLineSide,
} from '../../src/view/review-now';
import type { ReviewSnapshot } from '../../src/view/review-now';
import { ALPHA, COMPARISON, reviewLine, terminalSaying, TWO_SLOPE } from './sample-review';

const THROUGH = [terminalSaying('skelder', [400, 0]), terminalSaying('hask', [380, 180])];

function snapshotOf(...given: Parameters<typeof reviewSnapshot>): ReviewSnapshot {
  const found = reviewSnapshot(...given);
  if (!isComputable(found)) throw new Error(found.notComputable);
  return found;
}

const reason = (...given: Parameters<typeof reviewSnapshot>) => {
  const found = reviewSnapshot(...given);
  return isComputable(found) ? undefined : found.notComputable;
};

describe('a snapshot under review', () => {
  it('a line by reported magnitudes says that this cannot be told from its feed', () => {
    expect(reason(reviewLine({ goesBy: 'reported' }), TWO_SLOPE, THROUGH)).toContain(
      'can’t be told from this feed',
    );
  });

  it('a terminal that sent nothing is named', () => {
    const silent = terminalSaying('hask', [380, 180], { present: false, current: null });
    expect(reason(reviewLine(), TWO_SLOPE, [THROUGH[0]!, silent])).toBe(
      'Hask has sent no currents for this instant.',
    );
  });

  it('a terminal whose clock runs free is named', () => {
    const free = terminalSaying('hask', [380, 180], { clock: { source: 'free', error_us: 900 } });
    expect(reason(reviewLine(), TWO_SLOPE, [THROUGH[0]!, free])).toBe('Hask has lost its common time.');
  });

  it('each kind of scheme finds its own place for a through current', () => {
    const at = (recorded: typeof TWO_SLOPE) => {
      const point = reviewPoints(reviewLine(), recorded, snapshotOf(reviewLine(), recorded, THROUGH)).a;
      if (!isComputable(point)) throw new Error(point.notComputable);
      return point;
    };
    expect(at(TWO_SLOPE).differentialAmps).toBeCloseTo(20, 9);
    expect(at(TWO_SLOPE).restraintAmps).toBeCloseTo(390, 9);
    expect(at(ALPHA).region).toMatchObject({ kind: 'alpha-plane', ratio: 0.95 });
    expect(at(COMPARISON).region).toMatchObject({ kind: 'phase-comparison' });
  });

  it('symmetrical currents leave their differential to the positive sequence', () => {
    const found = reviewSequences(reviewLine(), TWO_SLOPE, snapshotOf(reviewLine(), TWO_SLOPE, THROUGH));
    expect(found.positive.differentialAmps).toBeCloseTo(20, 9);
    expect(found.zero.differentialAmps).toBeCloseTo(0, 9);
    expect(found.negative.differentialAmps).toBeCloseTo(0, 9);
  });

  it('behind a transformer the current comes back to the line’s side by ratio and clock number', () => {
    const line = reviewLine({
      inZoneTransformer: {
        otherVoltageKv: 55,
        clockNumber: 5,
        otherTerminals: ['hask'],
        removesZeroSequence: { line: true, other: true },
      },
    });
    // twice the current at half the voltage, lagging by five times 30° and opposed
    const sent = [terminalSaying('skelder', [400, 0]), terminalSaying('hask', [800, 180 - 150])];
    const snapshot = snapshotOf(line, TWO_SLOPE, sent);
    const [, hask] = terminalsOnLineSide(sent, snapshot);
    expect(hask?.current?.a[0]).toBeCloseTo(400, 9);
    expect(Math.abs(hask?.current?.a[1] ?? 0)).toBeCloseTo(180, 9);
    expect(broughtBy(line, 'none')).toBe('brought to the line’s side of the transformer');
  });

  it('currents that add up as measured need no words', () => {
    expect(broughtBy(reviewLine(), 'none')).toBeUndefined();
    expect(broughtBy(reviewLine(), 'fallen back')).toBeUndefined();
  });
});
