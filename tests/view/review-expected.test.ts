import { describe, expect, it } from 'vitest';
import { isComputable } from '../../src/protection/evaluation';
import { expectedLevels } from '../../src/view/review-expected';
import type { ExpectedLevels } from '../../src/view/review-expected';
import { reviewSnapshot } from '../../src/view/review-now';
import { expectedStrip } from '../../src/view/review-strip';
import { reviewLine, terminalSaying, TWO_SLOPE } from './sample-review';

const SENT = [terminalSaying('skelder', [400, 0]), terminalSaying('hask', [400, 180])];
const day = (standingAmps: number) => ({ standingAmps, p05Amps: 0, p95Amps: 50 });
const band = { a: day(13), b: day(60), c: day(1) };
/** 2 × (1 % and 60′) at opposite limits, per ampere of through current */
const BUDGET_AMPS = 400 * Math.hypot(2 * 0.01 * Math.cos(Math.PI / 180), 2 * Math.sin(Math.PI / 180));

function levels(change: Partial<Parameters<typeof expectedLevels>[0]> = {}): ExpectedLevels {
  const line = change.line ?? reviewLine();
  const recorded = change.recorded ?? TWO_SLOPE;
  const results = change.results ?? SENT;
  const found = expectedLevels({
    line,
    recorded,
    results,
    snapshot: reviewSnapshot(line, recorded, results),
    lastDay: band,
    throughAmps: 300,
    ...change,
  });
  if (!isComputable(found)) throw new Error(found.notComputable);
  return found;
}

const amps = (found: ExpectedLevels, cause: string) =>
  found.phases.a.expected.terms.find((term) => term.cause === cause)?.amps;

describe('the expected standing level', () => {
  it('is charging at the measured voltage and the class budget on the day’s through current', () => {
    const found = levels();
    expect(amps(found, 'charging')).toBeCloseTo(12.75, 2);
    expect(amps(found, 'transformers')).toBeCloseTo(BUDGET_AMPS, 1);
    expect(amps(found, 'channel')).toBeUndefined();
  });

  it('a level above the worst case and one far below the least are both said to be so', () => {
    // long cable: charging alone is far more than the transformers could oppose
    const found = levels({ line: reviewLine({ capacitanceNfPerKm: 60 }), lastDay: { ...band, b: day(150) } });
    expect(found.phases.b.judgement).toBe('above');
    expect(found.phases.c.judgement).toBe('far below');
    expect(found.phases.c.verdict).toContain('compensated twice?');
  });

  it('under charging compensation nothing of it is expected, and the window still starts from all of it', () => {
    const compensated = levels({ recorded: { chargingCompensation: true } });
    expect(amps(compensated, 'charging')).toBe(0);
    expect(compensated.uncompensatedAmps).toBeCloseTo(levels().uncompensatedAmps ?? NaN, 9);
  });

  it('where compensation falls back the charging is expected after all, with the reason', () => {
    const mute = SENT.map((each) => ({ ...each, voltage: null }));
    const found = levels({ recorded: { chargingCompensation: true }, results: mute });
    expect(amps(found, 'charging')).toBeCloseTo(12.75, 2);
    expect(found.assumptions.join(' ')).toContain(
      'not compensated, because no terminal gives a valid voltage',
    );
  });

  it('time by the channel adds its asymmetry', () => {
    const channel = { send_ms: 4, receive_ms: 3, loss_ppm: 0, path: 'main' };
    const timed = SENT.map((each) => ({
      ...each,
      clock: { source: 'channel' as const, error_us: 5 },
      channel,
    }));
    // half a millisecond at 50 Hz is 9°
    expect(amps(levels({ results: timed }), 'channel')).toBeCloseTo(800 * Math.sin((4.5 * Math.PI) / 180), 6);
  });

  it('a missing constant leaves no total and no verdict, and is named', () => {
    const found = levels({ line: reviewLine({ capacitanceNfPerKm: null }) });
    expect(found.phases.a.expected.worstCaseAmps).toBeUndefined();
    expect(found.phases.a.verdict).toBe('No verdict: charging is not known.');
    expect(found.uncompensatedAmps).toBeUndefined();
  });

  it('the strip holds every band and every measured level', () => {
    const strip = expectedStrip(levels());
    const shares = strip.lanes.flatMap(({ band: drawn, measured }) => [drawn?.to ?? 0, measured ?? 0]);
    expect(Math.max(...shares)).toBeLessThanOrEqual(1);
    expect(strip.lanes.map(({ phase }) => phase)).toEqual(['a', 'b', 'c']);
  });

  it('a strip without a total has no bands', () => {
    const strip = expectedStrip(levels({ line: reviewLine({ capacitanceNfPerKm: null }) }));
    expect(strip.lanes.every((lane) => lane.band === undefined)).toBe(true);
  });
});
