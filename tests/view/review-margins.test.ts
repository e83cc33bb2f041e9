import { describe, expect, it } from 'vitest';
import { isComputable } from '../../src/protection/evaluation';
import {
  reviewLoadability,
  reviewPickupWindow,
  reviewSensitivity,
  worstLoadability,
} from '../../src/view/review-margins';
import { reviewSnapshot } from '../../src/view/review-now';
import { COMPARISON, NO_COMPOSITIONS, reviewLine, terminalSaying, TWO_SLOPE } from './sample-review';

const line = reviewLine();
const susceptanceMs = (2 * Math.PI * 50 * 9 * 71) / 1e6;
/** charging of the whole line leads the voltage by 90° and stands in terminal 1 alone here */
const chargingAmps = (susceptanceMs * 110) / Math.sqrt(3);
const LOADED = [terminalSaying('skelder', [400, 0]), terminalSaying('hask', [400, 180])];
const input = {
  line,
  recorded: TWO_SLOPE,
  snapshot: reviewSnapshot(line, TWO_SLOPE, LOADED),
  compositions: NO_COMPOSITIONS,
};

describe('the margins of a line', () => {
  it('utilisation at emergency rating by class limits is that of the worst corner, the same for all phases', () => {
    const found = reviewLoadability(input, { basis: 'class limits', lagDeg: 30 });
    if (!isComputable(found.a) || !isComputable(found.c)) throw new Error('not computable');
    expect(found.a.atEmergency).toEqual(found.c.atEmergency);
    expect(found.a.atEmergency.differentialAmps).toBeGreaterThan(0.03 * 960);
    expect(found.a.limitAmps).toBeUndefined();
  });

  it('a line without a recorded capacitance has no prediction by class limits, and says so', () => {
    const bare = reviewLine({ capacitanceNfPerKm: null });
    const found = reviewLoadability({ ...input, line: bare }, { basis: 'class limits', lagDeg: 30 });
    expect(found.a).toMatchObject({ notComputable: expect.stringContaining('capacitance') as string });
    expect(worstLoadability(found)).toBeUndefined();
  });

  it('with no load a fault beyond the pickup by what charging opposes is seen', () => {
    const found = reviewSensitivity(input, 'all ends');
    if (!isComputable(found.noLoad)) throw new Error(found.noLoad.notComputable);
    expect(found.noLoad.faultAmps).toBeCloseTo(60 + chargingAmps, 1);
    expect(found.noLoad.faultResistanceOhm).toBeCloseTo(110_000 / Math.sqrt(3) / (60 + chargingAmps), 0);
  });

  it('over the present load a line by magnitudes says why nothing can be told', () => {
    const reported = reviewLine({ goesBy: 'reported' });
    const snapshot = reviewSnapshot(reported, TWO_SLOPE, LOADED);
    const found = reviewSensitivity({ ...input, line: reported, snapshot }, 'one end');
    expect(isComputable(found.noLoad)).toBe(true);
    expect(found.presentLoad.b).toMatchObject({
      notComputable: expect.stringContaining('can’t be told from this feed') as string,
    });
  });

  it('the pickup window goes from the owner’s multiple to the recorded least fault', () => {
    expect(reviewPickupWindow(input, { multiple: 2.5, uncompensatedAmps: 20 })).toEqual({
      lowerAmps: 50,
      upperAmps: 620,
      pickupLies: 'within',
      pickupAmps: 60,
    });
  });

  it('a phase comparison has no pickup, and says so', () => {
    const found = reviewPickupWindow(
      { line, recorded: COMPARISON },
      { multiple: 2.5, uncompensatedAmps: 20 },
    );
    expect(found).toMatchObject({ notComputable: expect.stringContaining('release current') as string });
  });
});
