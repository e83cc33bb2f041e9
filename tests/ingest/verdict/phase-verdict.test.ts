import { describe, expect, it } from 'vitest';
import { countedDrift } from '../../../src/view/counted-drift';
import { phaseStep } from '../../../src/ingest/verdict/phase-step';
import { demoHistoryOf, demoRosterLine, verdictOf } from '../demo-history';

// midnight, so that the history holds whole days
const NOW_MS = Date.UTC(2026, 2, 2);
const TWO_MONTHS = { nowMs: NOW_MS, epochMs: NOW_MS, days: 60, sampleMs: 600_000 } as const;

function verdictsOf(key: string) {
  const line = demoRosterLine(key);
  const history = demoHistoryOf(line, TWO_MONTHS);
  return (phase: 'a' | 'b' | 'c') => verdictOf(line, history, phase);
}

describe('the story of a slowly creeping ratio error', () => {
  const of = verdictsOf('skelder-low-pell-2');

  it('is told by phase, terminal and cause', () => {
    const b = of('b');
    expect(b.composition.kind).toBe('separated');
    expect([b.likelyCause, b.causePlace]).toEqual([
      'ratio mismatch',
      { terminal: 'low-pell', against: null },
    ]);
    expect(b.creepAtReference?.creep).toMatchObject({ verdict: 'creep' });
    expect(b.creepAtReference!.creep.slopeAmpsPerMonth).toBeGreaterThan(2.5);
    expect(b.creepAtReference!.creep.slopeAmpsPerMonth).toBeLessThan(4.5);
    expect(b.near?.likely).not.toBeNull();
  });

  it('has its mismatch beyond the class budget, while charging stays what the register expects', () => {
    const { composition } = of('b');
    if (composition.kind !== 'separated') throw new Error(composition.reason);
    expect(composition.mismatches[0]).toMatchObject({ terminal: 'low-pell', ratioBudget: 'beyond' });
    const charging = composition.chargingAmps!;
    expect(Math.abs(charging.value - composition.expectedChargingAmps!)).toBeLessThan(1);
  });

  it('leaves the other phases alone', () => {
    for (const phase of ['a', 'c'] as const) {
      const verdict = of(phase);
      expect(verdict.creepAtReference, phase).toBeNull();
      if (verdict.composition.kind !== 'separated') throw new Error(verdict.composition.reason);
      expect(verdict.composition.mismatches[0]?.ratioBudget, phase).toBe('within');
    }
  });
});

describe('a cable whose charging takes most of its pickup', () => {
  it('is named as charging, as much as the register expects', () => {
    const verdict = verdictsOf('hask-ostrel-cable')('a');
    if (verdict.composition.kind !== 'separated') throw new Error(verdict.composition.reason);
    const { chargingAmps, expectedChargingAmps } = verdict.composition;
    expect(verdict.likelyCause).toBe('charging');
    expect(Math.abs(chargingAmps!.value / expectedChargingAmps! - 1)).toBeLessThan(0.01);
    expect(verdict.shareOfPickup).toBeGreaterThan(0.55);
    expect(verdict.shareOfPickup).toBeLessThan(0.7);
  });
});

describe('what can’t be told', () => {
  it.each([
    ['brindle-skelder', /magnitudes alone|No snapshot/],
    ['fennick-ostrel', /no voltage/],
    ['low-pell-skelder-hask', /always loaded alike/],
    ['low-pell-quillby', /load hardly changes/],
    ['hask-marrow-gate', /No snapshot of this window counts/],
  ])('is said in words for %s, without a number', (key, reason) => {
    const { composition, likelyCause, emergencyUtilisation } = verdictsOf(key)('a');
    expect(composition).toMatchObject({
      kind: 'not separable',
      reason: expect.stringMatching(reason) as string,
    });
    expect([likelyCause, emergencyUtilisation]).toEqual(['not told', null]);
  });
});

describe('a line without a composition', () => {
  it('has its levels at one load by what magnitudes do with it', () => {
    const verdict = verdictsOf('brindle-skelder')('a');
    expect([verdict.loadTakenOutBy, verdict.measuredCounts]).toEqual(['magnitudes', false]);
    expect(countedDrift(verdict)).toBeUndefined();
  });
});

describe('a step on a line by magnitudes alone', () => {
  const line = demoRosterLine('brindle-skelder');
  const history = demoHistoryOf(line, TWO_MONTHS);
  const stepHour = NOW_MS / 3_600_000 - 40;
  /** A mismatch that follows the load at right angles to what stands, and a step on top of both. */
  const stepped = (amps: number) => ({
    ...history,
    hours: history.hours.map((row) => ({
      ...row,
      medianAmps:
        Math.hypot(row.medianAmps!, 0.05 * row.meanThroughAmps!) +
        (row.start.getTime() / 3_600_000 >= stepHour ? amps : 0),
    })),
  });
  const found = (amps: number) => phaseStep(line, stepped(amps), { phase: 'a', earlier: undefined });

  it('is seen through the load cycle, with its hour and without a cause', () => {
    const step = found(1.5);
    expect(Math.abs(Date.parse(step!.at) / 3_600_000 - stepHour)).toBeLessThanOrEqual(1);
    expect([step!.cause, step!.place]).toEqual(['not told', null]);
    // the cycle itself swings the level by more than that
    const levels = stepped(0)
      .hours.filter(({ phase }) => phase === 'a')
      .map(({ medianAmps }) => medianAmps);
    expect(Math.max(...levels) - Math.min(...levels)).toBeGreaterThan(1.5);
  });

  it('is not seen where there is none', () => expect(found(0)).toBeNull());
});

describe('a drift as measured', () => {
  const line = demoRosterLine('low-pell-quillby');
  const history = demoHistoryOf(line, TWO_MONTHS);
  const rising = (loadGrowth: number) => ({
    ...history,
    hoursOfLoad: [],
    days: history.days.map((row, index) => ({
      ...row,
      medianAmps: row.medianAmps! + 0.2 * Math.floor(index / 3),
      meanThroughAmps: row.meanThroughAmps! * (1 + loadGrowth * (index / history.days.length)),
    })),
  });

  it('counts where nothing takes the load out and the load has stood still', () => {
    const verdict = verdictOf(line, rising(0), 'a');
    expect([verdict.loadTakenOutBy, verdict.measuredCounts]).toEqual([null, true]);
    expect(countedDrift(verdict)).toEqual(verdict.creep);
  });

  it('does not where the load has grown with it', () => {
    const verdict = verdictOf(line, rising(0.2), 'a');
    expect(verdict.creep).not.toBeNull();
    expect(countedDrift(verdict)).toBeUndefined();
  });
});

describe('the story of a channel that took another path', () => {
  const of = verdictsOf('fennick-low-pell');

  it.each(['a', 'b', 'c'] as const)(
    'is told in phase %s: when, how much, and that the channel moved',
    (phase) => {
      const { step } = of(phase);
      const nineDaysAgo = NOW_MS - 9 * 86_400_000;
      expect(Math.abs(Date.parse(step!.at) - nineDaysAgo)).toBeLessThanOrEqual(3_600_000);
      expect(step!.toAmps - step!.fromAmps).toBeGreaterThan(20);
      expect(step).toMatchObject({
        cause: 'angle mismatch',
        place: { terminal: 'low-pell', against: 'fennick' },
        isTime: true,
        channelPathChanged: true,
      });
    },
  );

  it('parts the composition: what stands now is not mixed with what stood before', () => {
    const { composition } = of('a');
    if (composition.kind !== 'separated') throw new Error(composition.reason);
    expect(composition.mismatches[0]?.angleBudget).toBe('beyond');
    expect(Math.abs(composition.chargingAmps!.value - composition.expectedChargingAmps!)).toBeLessThan(2);
  });
});

describe('a step that an earlier look found', () => {
  it('is kept, and looked for again only in what has come since', () => {
    const line = demoRosterLine('skelder-low-pell-1');
    const step = {
      at: '2026-01-10T10:00:00.000Z',
      fromAmps: 10,
      toAmps: 14,
      cause: 'charging',
      place: null,
      isTime: false,
      channelPathChanged: false,
    } as const;
    const earlier = { step, computedAt: new Date(NOW_MS - 3_600_000).toISOString() };
    expect(phaseStep(line, demoHistoryOf(line, TWO_MONTHS), { phase: 'a', earlier })).toEqual(step);
  });
});

describe('a line that compensates its charging', () => {
  it('shows no charging in what stands, and is not told to expect any', () => {
    const { composition, likelyCause } = verdictsOf('skelder-hask')('a');
    if (composition.kind !== 'separated') throw new Error(composition.reason);
    expect(Math.abs(composition.chargingAmps!.value)).toBeLessThan(0.5);
    expect(composition.expectedChargingAmps).toBeCloseTo(0, 6);
    expect(likelyCause).not.toBe('charging');
  });
});

describe('a line that stays as it is', () => {
  it.each(['brindle-marrow-gate', 'quillby-hask-1', 'skelder-low-pell-1'])(
    '%s has no step and no drift',
    (key) => {
      const of = verdictsOf(key);
      for (const phase of ['a', 'b', 'c'] as const)
        expect([of(phase).step, of(phase).creepAtReference], phase).toEqual([null, null]);
    },
  );
});
