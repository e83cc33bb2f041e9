import { describe, expect, it } from 'vitest';
import { TREND_SPANS, spanFromAddress, spanInAddress, trendWindow } from '../../src/view/trend-span';

describe('the span of a trend', () => {
  it('every span comes back from the address it was written to', () => {
    for (const span of TREND_SPANS) expect(spanFromAddress(spanInAddress(span))).toBe(span);
  });

  it('an unknown span is two months', () => {
    expect(spanFromAddress('century')).toBe('two months');
    expect(spanFromAddress(null)).toBe('two months');
  });

  it('rows begin with a whole hour, snapshots to the instant', () => {
    const nowMs = Date.parse('2026-03-01T10:17:31.000Z');
    expect(new Date(trendWindow('day', nowMs).fromMs).toISOString()).toBe('2026-02-28T10:00:00.000Z');
    expect(nowMs - trendWindow('hour', nowMs).fromMs).toBe(3_600_000);
  });
});
