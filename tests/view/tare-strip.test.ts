import { describe, expect, it } from 'vitest';
import { phaseCondition } from '../../src/view/phase-condition';
import { placedLabels, type ScaleLabel } from '../../src/view/scale-labels';
import { sparkline } from '../../src/view/sparkline';
import { tareStrip } from '../../src/view/tare-strip';
import { blindLine, CREEP, lineWith, NOTHING_COMPUTED, phaseAt, SITE, warningWith } from './sample-lines';

describe('the tare strip', () => {
  it('places each phase by its utilisation and its band by its own threshold', () => {
    const day = { standingAmps: 20, p05Amps: 18, p95Amps: 24 };
    const picture = tareStrip(
      lineWith({
        phases: { a: phaseAt(0.2, 100), b: phaseAt(0.1, 120), c: phaseAt(0.1, 80) },
        lastDay: { a: day, b: day, c: null },
      }),
      SITE,
    );
    expect(picture.post).toBe('threshold');
    expect(picture.lanes.map(({ marker }) => marker)).toEqual([0.2, 0.1, 0.1]);
    expect(picture.lanes[0]!.band).toEqual({ from: 0.18, to: 0.24 });
    expect(picture.lanes[1]!.band).toEqual({ from: 0.15, to: 0.2 });
    expect(picture.lanes.map(({ pickup }) => pickup)).toEqual([0.6, 0.5, 0.75]);
  });

  it('shows a value beyond the threshold at the post, and says that it is beyond', () => {
    const lane = tareStrip(
      lineWith({ condition: 'over', phases: { a: phaseAt(1.4), b: phaseAt(0.2), c: phaseAt(0.2) } }),
      SITE,
    ).lanes[0]!;
    expect(lane).toMatchObject({ marker: 1, beyond: true, condition: 'over' });
  });

  it('has no markers while the line is blind, and the pickup for its post', () => {
    const picture = tareStrip(blindLine(), SITE);
    expect(picture.lanes.map(({ marker }) => marker)).toEqual([undefined, undefined, undefined]);
    expect(picture.post).toBe('pickup');
    expect(picture.words).toContain('Phase L1 not computable');
  });

  it('has no scale without settings', () => {
    const picture = tareStrip(blindLine({ condition: 'not evaluated', pickupAmps: null }), SITE);
    expect([picture.post, picture.near]).toEqual(['none', undefined]);
  });

  it('never prints NaN, whatever is missing', () => {
    const half = lineWith({
      phases: { a: phaseAt(0), b: NOTHING_COMPUTED, c: { ...NOTHING_COMPUTED, thresholdAmps: 0 } },
    });
    for (const line of [half, blindLine(), blindLine({ pickupAmps: null }), lineWith({ pickupAmps: 0 })])
      expect(JSON.stringify(tareStrip(line, SITE))).not.toMatch(/NaN|null|Infinity/);
  });

  it('says in words what it shows', () => {
    expect(tareStrip(lineWith(), SITE).words.replaceAll('\u00a0', ' ')).toBe(
      'Phase L1 at 10 % of its threshold, phase L2 at 20 % of its threshold, phase L3 at 15 % of its threshold. ' +
        'Pickup at 60 %, near mark at 70 %.',
    );
  });
});

describe("a phase's colour", () => {
  const phases = { a: phaseAt(0.8), b: phaseAt(0.2), c: phaseAt(0.2) };

  it('goes only to the phase that earns the condition of the line', () => {
    const line = lineWith({ condition: 'near', phases });
    expect((['a', 'b', 'c'] as const).map((phase) => phaseCondition(line, phase, 0.7))).toEqual([
      'near',
      'settled',
      'settled',
    ]);
  });

  it('is never worse than the condition of the line, which waits out short excursions', () => {
    expect(phaseCondition(lineWith({ phases }), 'a', 0.7)).toBe('settled');
    expect(phaseCondition(lineWith({ condition: 'rising', phases, creep: [CREEP] }), 'b', 0.7)).toBe(
      'rising',
    );
  });

  it('stays with the phase that raised the warning until the warning goes', () => {
    const line = lineWith({ condition: 'near', warnings: [warningWith()] });
    expect(phaseCondition(line, 'c', 0.7)).toBe('near');
    expect(phaseCondition(line, 'a', 0.7)).toBe('settled');
  });
});

describe('the labels under a scale', () => {
  const spans = (widthPx: number, pickup: number) => {
    const labels: ScaleLabel[] = [
      { words: 'threshold', at: 1, anchors: ['end'] },
      { words: '0', at: 0, anchors: ['start'] },
      { words: 'near', at: 0.7, anchors: ['end', 'start'] },
      { words: 'pickup', at: pickup, anchors: ['middle', 'start', 'end'] },
    ];
    return placedLabels(labels, widthPx).map(({ words, at, anchor, row }) => {
      const wide = words.length * 6;
      const from = at * widthPx - (anchor === 'start' ? 0 : anchor === 'end' ? wide : wide / 2);
      return { row, from, to: from + wide };
    });
  };

  it('never collide, wherever the pickup stands and from a phone to a wide desk', () => {
    for (const widthPx of [250, 440, 900])
      for (let pickup = 0.02; pickup <= 0.985; pickup += 0.01) {
        const placed = spans(widthPx, pickup);
        placed.forEach((one, index) =>
          placed.slice(index + 1).forEach((other) => {
            const apart = one.row !== other.row || one.to <= other.from || one.from >= other.to;
            expect(apart, `${widthPx} px, pickup at ${pickup}`).toBe(true);
          }),
        );
      }
  });
});

describe('the sparkline', () => {
  it('breaks where a day has no level, rather than falling to zero', () => {
    const levels = [10, 11, null, 12, 13];
    const days = levels.map((levelAmps, index) => ({ day: `2026-11-0${index + 1}`, levelAmps }));
    expect(sparkline(days, 42)!.runs.map((run) => run.length)).toEqual([2, 2]);
  });

  it('is not drawn from fewer than two days', () => {
    expect(sparkline([{ day: '2026-11-01', levelAmps: 3 }], 42)).toBeUndefined();
    expect(sparkline([], undefined)).toBeUndefined();
  });
});
