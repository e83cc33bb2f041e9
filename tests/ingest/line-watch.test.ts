import { beforeEach, describe, expect, it } from 'vitest';
import type { Measurement } from '../../src/contract/feed';
import type { Creep } from '../../src/contract/warning';
import { computedSnapshot } from '../../src/ingest/computed-snapshot';
import {
  conditionOf,
  type LineWatch,
  lineWatch,
  type WarningChange,
  watchFindings,
  watchSnapshot,
  watchTime,
} from '../../src/ingest/line-watch';
import type { RegisteredLine } from '../../src/store/register';
import { warningLimits } from '../../src/warnings/limits';
import { AT_MS, balanced, measurement, registeredLine, rosterLine, withTransformer } from './made-up-feed';

const PERIOD_MS = 2_000;
const LIMITS = warningLimits({ nearRatio: 0.7, periodMs: PERIOD_MS, latenessMs: 2_000 });
const PICKUP_AMPS = 120;

let watch: LineWatch;
/** the site's clock, and the instant of the newest snapshot */
let nowMs: number;
beforeEach(() => {
  nowMs = AT_MS;
  watch = newWatch();
});
const newWatch = (line: Partial<RegisteredLine> = {}, standing: ('near' | 'blind')[] = []) =>
  lineWatch(rosterLine(registeredLine(line)), new Set(standing), AT_MS);

/** A snapshot of the pair of terminals whose differential is this share of the pickup, at a load below the slope. */
function snapshotAt(atMs: number, utilisation: number, change: Partial<Measurement> = {}) {
  const sent = (amps: number, degrees: number) =>
    measurement({ current: balanced(amps, degrees), ...change });
  const measurements = new Map([
    ['arden', sent(200 + utilisation * PICKUP_AMPS, 0)],
    ['birk', sent(200, 180)],
  ]);
  return computedSnapshot({ line: watch.line, atMs, measurements }, 100);
}

/** The next period: a snapshot comes in, and the worker looks at the clock. */
function sees(utilisation: number, change: Partial<Measurement> = {}): WarningChange[] {
  nowMs += PERIOD_MS;
  const snapshot = snapshotAt(nowMs, utilisation, change);
  return [...watchSnapshot(watch, snapshot, { nowMs, limits: LIMITS }), ...watchTime(watch, nowMs, LIMITS)];
}

/** As many periods at a utilisation; every change of the span. */
const seesFor = (spanMs: number, utilisation: number, change?: Partial<Measurement>): WarningChange[] =>
  Array.from({ length: spanMs / PERIOD_MS }, () => sees(utilisation, change)).flat();

/** Time passes, and nothing comes. */
function hearsNothingFor(spanMs: number): WarningChange[] {
  const changes: WarningChange[] = [];
  for (const endMs = nowMs + spanMs; nowMs < endMs;)
    changes.push(...watchTime(watch, (nowMs += 100), LIMITS));
  return changes;
}
const turnsOf = (changes: readonly WarningChange[]) => changes.map(({ turn, kind }) => `${kind} ${turn}`);

describe('near by utilisation', () => {
  it('opens when the mark has been reached for 60 s, with the figures that raised it', () => {
    sees(0.7);
    expect(seesFor(58_000, 0.7)).toEqual([]);
    expect(conditionOf(watch)).toBe('settled');
    const [opened, ...others] = sees(0.75);
    expect(others).toEqual([]);
    expect(opened).toMatchObject({
      turn: 'opens',
      kind: 'near',
      atMs: nowMs,
      cause: { basis: 'utilisation', phase: 'a', limit: 0.7, thresholdAmps: PICKUP_AMPS },
    });
    expect(opened).toHaveProperty('cause.utilisation', expect.closeTo(0.75, 9));
    expect(opened).toHaveProperty('cause.differentialAmps', expect.closeTo(90, 9));
    expect(conditionOf(watch)).toBe('near');
  });

  it('returns when utilisation has been below the band for 60 s', () => {
    seesFor(62_000, 0.8);
    sees(0.6);
    expect(seesFor(58_000, 0.6)).toEqual([]);
    expect(sees(0.6)).toEqual([{ turn: 'returns', kind: 'near', atMs: nowMs }]);
    expect(conditionOf(watch)).toBe('settled');
  });

  it('stays for as long as utilisation lies between mark and band', () => {
    seesFor(62_000, 0.8);
    expect(seesFor(600_000, 0.67)).toEqual([]);
    expect(conditionOf(watch)).toBe('near');
  });

  it('is not opened by a utilisation that swings about the mark', () => {
    const swings = Array.from({ length: 600 }, (_, period) => sees(period % 29 === 0 ? 0.69 : 0.75)).flat();
    expect(swings).toEqual([]);
  });

  it('that stands does not chatter while utilisation swings about the mark', () => {
    expect(turnsOf(seesFor(62_000, 0.71))).toEqual(['near opens']);
    const swings = Array.from({ length: 600 }, (_, period) => sees(period % 2 === 0 ? 0.6 : 0.75)).flat();
    expect(swings).toEqual([]);
  });

  it('found standing at the start is not opened again, and returns as any other', () => {
    watch = newWatch({}, ['near']);
    expect(seesFor(120_000, 0.8)).toEqual([]);
    expect(turnsOf(seesFor(62_000, 0.5))).toEqual(['near returns']);
  });
});

describe('over', () => {
  it('opens at once', () => {
    expect(sees(1)).toMatchObject([
      { turn: 'opens', kind: 'over', atMs: nowMs, cause: { basis: 'utilisation', limit: 1 } },
    ]);
    expect(conditionOf(watch)).toBe('over');
  });

  it('returns when utilisation has been below its band for 30 s', () => {
    sees(1.2);
    expect(seesFor(20_000, 0.97)).toEqual([]);
    sees(0.6);
    expect(seesFor(28_000, 0.6)).toEqual([]);
    expect(turnsOf(sees(0.6))).toEqual(['over returns']);
  });

  it('is joined by near when it lasts', () => {
    expect(turnsOf(seesFor(62_000, 1.1))).toEqual(['over opens', 'near opens']);
    expect(conditionOf(watch)).toBe('over');
  });
});

describe('blind', () => {
  it('opens when three periods were missed, and names the silent terminals', () => {
    sees(0.2);
    expect(hearsNothingFor(LIMITS.blindAfterMs - 100)).toEqual([]);
    expect(conditionOf(watch)).toBe('settled');
    expect(hearsNothingFor(100)).toMatchObject([
      { turn: 'opens', kind: 'blind', cause: { basis: 'terminal silent', terminals: ['arden', 'birk'] } },
    ]);
    expect(conditionOf(watch)).toBe('blind');
    // the last instant, three periods after it, and the lateness that the fourth is waited for
    expect(LIMITS.blindAfterMs).toBe(4 * PERIOD_MS + 2_000);
  });

  it('opens on a line of which nothing was ever heard', () => {
    expect(turnsOf(hearsNothingFor(20_000))).toEqual(['blind opens']);
  });

  it('names the terminal that is missing while the other is heard', () => {
    sees(0.2);
    const changes = Array.from({ length: 6 }, () => {
      nowMs += PERIOD_MS;
      const alone = new Map([['birk', measurement()]]);
      const snapshot = computedSnapshot({ line: watch.line, atMs: nowMs, measurements: alone }, 100);
      return [
        ...watchSnapshot(watch, snapshot, { nowMs, limits: LIMITS }),
        ...watchTime(watch, nowMs, LIMITS),
      ];
    }).flat();
    expect(changes).toMatchObject([
      { turn: 'opens', kind: 'blind', cause: { basis: 'terminal silent', terminals: ['arden'] } },
    ]);
  });

  it.each([
    ['invalid measurements', { validity: 'invalid' }, 'validity'],
    ['clocks that run free', { clock: { source: 'free', error_us: 5 } }, 'clock'],
  ] as const)('opens by %s that last, and says so', (_, change, basis) => {
    sees(0.2);
    expect(seesFor(8_000, 0.2, change)).toEqual([]);
    expect(sees(0.2, change)).toMatchObject([
      { turn: 'opens', kind: 'blind', cause: { basis, terminals: ['arden', 'birk'] } },
    ]);
  });

  it('returns when three periods were seen again', () => {
    hearsNothingFor(20_000);
    expect(seesFor(3 * PERIOD_MS, 0.2)).toEqual([]);
    expect(turnsOf(sees(0.2))).toEqual(['blind returns']);
    expect(conditionOf(watch)).toBe('settled');
  });

  it('does not return for single measurements between silences', () => {
    hearsNothingFor(20_000);
    const changes = Array.from({ length: 5 }, () => [...sees(0.2), ...hearsNothingFor(12_000)]).flat();
    expect(changes).toEqual([]);
  });

  it('comes before near, which still stands when the line is seen again', () => {
    seesFor(62_000, 0.8);
    expect(turnsOf(hearsNothingFor(20_000))).toEqual(['blind opens']);
    expect(conditionOf(watch)).toBe('blind');
    expect(watch.standing.has('near')).toBe(true);
    expect(turnsOf(seesFor(10_000, 0.8))).toEqual(['blind returns']);
    expect(conditionOf(watch)).toBe('near');
  });

  it('stands, once, while an hour of backlog is caught up with', () => {
    nowMs += 3_600_000;
    const changes: WarningChange[] = [];
    for (let atMs = AT_MS; atMs <= nowMs; atMs += PERIOD_MS) {
      nowMs += 1;
      changes.push(...watchSnapshot(watch, snapshotAt(atMs, 0.2), { nowMs, limits: LIMITS }));
      changes.push(...watchTime(watch, nowMs, LIMITS));
    }
    expect(turnsOf(changes)).toEqual(['blind opens', 'blind returns']);
    expect(changes[1]!.atMs).toBeGreaterThan(nowMs - LIMITS.blindAfterMs);
  });

  it('opens when the clock was set back, since what was last seen lies ahead', () => {
    sees(0.2);
    nowMs -= 3_600_000;
    expect(turnsOf(hearsNothingFor(100))).toEqual(['blind opens']);
  });

  it('lets a replayed hour be judged by its own instants', () => {
    nowMs += 3_600_000;
    const opened: WarningChange[] = [];
    for (let period = 0; period <= 31; period += 1) {
      const snapshot = snapshotAt(AT_MS + period * PERIOD_MS, 0.8);
      opened.push(...watchSnapshot(watch, snapshot, { nowMs, limits: LIMITS }));
    }
    expect(opened).toMatchObject([{ kind: 'near', turn: 'opens', atMs: AT_MS + 60_000 }]);
  });
});

describe('a standing level against the pickup', () => {
  const found = (levelAmps: number) =>
    watchFindings(
      watch,
      { levelAmps: { a: 10, b: levelAmps, c: 20 }, creep: [], step: undefined },
      { atMs: nowMs, limits: LIMITS },
    );

  it('opens near at 70 %, and returns it below 65 %', () => {
    sees(0.2);
    expect(found(83.9)).toEqual([]);
    expect(found(84)).toMatchObject([
      {
        turn: 'opens',
        kind: 'near',
        cause: { basis: 'standing level', phase: 'b', levelAmps: 84, pickupAmps: PICKUP_AMPS },
      },
    ]);
    expect(found(78.1)).toEqual([]);
    expect(conditionOf(watch)).toBe('near');
    expect(found(77.9)).toEqual([{ turn: 'returns', kind: 'near', atMs: nowMs }]);
  });

  it('keeps near standing while utilisation, lowered by a heavy load, is far from the mark', () => {
    found(90);
    expect(seesFor(120_000, 0.3)).toEqual([]);
    expect(conditionOf(watch)).toBe('near');
  });

  it('raises nothing on a line without settings in force', () => {
    watch = newWatch({ settings: [] });
    expect(found(500)).toEqual([]);
  });
});

describe('creep', () => {
  const creep = (verdict: Creep['verdict']): Creep => ({
    phase: 'b',
    verdict,
    slopeAmpsPerMonth: 2.1,
    slopeLowAmpsPerMonth: 1.8,
    slopeHighAmpsPerMonth: 2.4,
    pTwoSided: 0.0001,
    days: 60,
    levelNowAmps: 40,
    near: { earliest: '2027-01-01', likely: '2027-03-01', latest: null },
    pickup: { earliest: null, likely: null, latest: null },
  });
  const found = (...drifts: Creep[]) =>
    watchFindings(
      watch,
      { levelAmps: { a: 10, b: 40, c: 12 }, creep: drifts, step: undefined },
      { atMs: nowMs, limits: LIMITS },
    );

  it('by a recent step opens rising as well, and names it', () => {
    const step = {
      basis: 'step',
      phase: 'a',
      at: '2026-03-01T10:00:00.000Z',
      fromAmps: 25,
      toAmps: 56,
      channelPathChanged: true,
    } as const;
    const levelAmps = { a: 56, b: 40, c: 12 };
    const changes = watchFindings(watch, { levelAmps, creep: [], step }, { atMs: nowMs, limits: LIMITS });
    expect(changes).toEqual([{ turn: 'opens', kind: 'rising', atMs: nowMs, cause: step }]);
  });

  it('opens rising, and its end returns it', () => {
    expect(found(creep('creep'))).toEqual([
      { turn: 'opens', kind: 'rising', atMs: nowMs, cause: { basis: 'creep', creep: creep('creep') } },
    ]);
    expect(conditionOf(watch)).toBe('rising');
    expect(found(creep('creep'))).toEqual([]);
    expect(seesFor(10_000, 0.3)).toEqual([]);
    expect(found()).toEqual([{ turn: 'returns', kind: 'rising', atMs: nowMs }]);
  });

  it('within margin raises nothing', () => {
    expect(found(creep('within margin'))).toEqual([]);
  });
});

describe('what raises nothing', () => {
  it('is a terminal under test, which is seen all the same', () => {
    expect(seesFor(120_000, 1.5, { test: true })).toEqual([]);
    expect(conditionOf(watch)).toBe('settled');
    expect(watch.newest?.points?.a.utilisation).toBeCloseTo(1.5, 9);
  });

  it('is a test amid a warning: what stood still stands', () => {
    seesFor(62_000, 0.8);
    expect(seesFor(120_000, 0.1, { test: true })).toEqual([]);
    expect(conditionOf(watch)).toBe('near');
  });

  const unjudgeable: [string, Partial<RegisteredLine>][] = [
    ['without settings', { settings: [] }],
    ['with a transformer in its zone', withTransformer()],
  ];
  it.each(unjudgeable)('is a line %s, heard or not', (_, line) => {
    watch = newWatch(line);
    expect([...seesFor(120_000, 2), ...hearsNothingFor(60_000)]).toEqual([]);
    expect(conditionOf(watch)).toBe('not evaluated');
  });

  it('is a line out of service', () => {
    watch = newWatch({ inService: false });
    expect([...seesFor(120_000, 2), ...hearsNothingFor(60_000)]).toEqual([]);
    expect(conditionOf(watch)).toBe('out of service');
  });

  it('is the end of the register’s interest: what stood returns when a line is taken out of service', () => {
    seesFor(62_000, 0.8);
    watch.line = rosterLine(registeredLine({ inService: false }));
    expect(turnsOf(hearsNothingFor(100))).toEqual(['near returns']);
  });
});

describe('a snapshot that is no newer', () => {
  it('corrects the newest figures and is not judged a second time', () => {
    sees(0.2);
    const alone = new Map([['birk', measurement()]]);
    nowMs += PERIOD_MS;
    const incomplete = computedSnapshot({ line: watch.line, atMs: nowMs, measurements: alone }, 100);
    watchSnapshot(watch, incomplete, { nowMs, limits: LIMITS });
    expect(watch.newest?.points).toBeUndefined();
    const before = watch.judgement;
    const changes = watchSnapshot(watch, snapshotAt(nowMs, 0.5), { nowMs: nowMs + 2_500, limits: LIMITS });
    expect(changes).toEqual([]);
    expect(watch.judgement).toBe(before);
    expect(watch.newest?.points?.a.utilisation).toBeCloseTo(0.5, 9);
  });

  it('but older changes neither the newest nor the judgement', () => {
    sees(0.2);
    sees(0.3);
    const { newest, judgement } = watch;
    expect(watchSnapshot(watch, snapshotAt(nowMs - PERIOD_MS, 2), { nowMs, limits: LIMITS })).toEqual([]);
    expect(watch.newest).toBe(newest);
    expect(watch.judgement).toBe(judgement);
  });
});

describe('a line with all breakers open', () => {
  it('is out of service while that lasts', () => {
    sees(0.1, { breaker: 'open' });
    expect(conditionOf(watch)).toBe('out of service');
    sees(0.1);
    expect(conditionOf(watch)).toBe('settled');
  });
});
