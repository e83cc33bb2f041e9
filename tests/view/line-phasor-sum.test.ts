import { describe, expect, it } from 'vitest';
import type { TerminalResult } from '../../src/contract/result';
import { closingPicture, wholePicture } from '../../src/view/line-phasor-picture';
import { phasorSum } from '../../src/view/line-phasor-sum';

const terminal = (key: string, amps: number, degrees: number): TerminalResult => ({
  key,
  present: true,
  current: { a: [amps, degrees], b: [0, 0], c: [0, 0] },
  voltage: null,
  frequencyHz: 50,
  breaker: 'closed',
  clock: null,
  channel: null,
  validity: 'good',
  test: false,
});
/** Phase a of terminals that are all in service. */
const sumOf = (terminals: TerminalResult[]) =>
  phasorSum(terminals, { phase: 'a', inService: terminals.map(({ key }) => key) });
const BOX = { width: 300, height: 132, margin: 16 };

describe('currents head to tail', () => {
  it('what is left over is the differential current', () => {
    const sum = sumOf([terminal('one', 5, -80), terminal('two', 3, -80)]);
    expect(sum?.differentialAmps).toBeCloseTo(8, 9);
  });

  it('the greatest current points right, whatever the time reference', () => {
    const sum = sumOf([terminal('one', 100, 33), terminal('two', 98, -147)]);
    expect(sum?.steps[0]?.to.re).toBeCloseTo(100, 9);
    expect(sum?.steps[0]?.to.im).toBeCloseTo(0, 9);
    expect(sum?.differentialAmps).toBeCloseTo(2, 9);
  });

  it('each arrow begins where the one before it ends', () => {
    const sum = sumOf([terminal('one', 100, 0), terminal('two', 60, 170), terminal('three', 39, 190)])!;
    expect(sum.steps[1]?.from).toEqual(sum.steps[0]?.to);
    expect(sum.steps[2]?.from).toEqual(sum.steps[1]?.to);
    expect(sum.steps[2]?.to).toEqual(sum.differential);
  });

  it('one terminal without currents leaves nothing to add up', () => {
    const silent = { ...terminal('two', 0, 0), present: false, current: null };
    expect(sumOf([terminal('one', 100, 0), silent])).toBeUndefined();
    expect(sumOf([])).toBeUndefined();
  });
});

describe('terminals out of service', () => {
  it('are left out of the sum', () => {
    const sum = phasorSum([terminal('one', 100, 0), terminal('two', 98, 180), terminal('old', 5, 0)], {
      phase: 'a',
      inService: ['one', 'two'],
    });
    expect(sum?.differentialAmps).toBeCloseTo(2, 9);
  });
});

describe('the drawing of the sum', () => {
  const sum = sumOf([terminal('one', 500, 0), terminal('two', 490, 178)])!;

  it('the whole polygon lies inside its box', () => {
    const { arrows } = wholePicture(sum, BOX);
    for (const { from, to } of arrows)
      for (const { x, y } of [from, to]) {
        expect(x).toBeGreaterThanOrEqual(BOX.margin - 1e-6);
        expect(x).toBeLessThanOrEqual(BOX.width - BOX.margin + 1e-6);
        expect(y).toBeGreaterThanOrEqual(BOX.margin - 1e-6);
        expect(y).toBeLessThanOrEqual(BOX.height - BOX.margin + 1e-6);
      }
  });

  it('a gap too small to see is magnified', () => {
    const closing = closingPicture(sum, BOX);
    expect(closing!.pixelsPerAmp).toBeGreaterThan(3 * wholePicture(sum, BOX).pixelsPerAmp);
  });

  it('a gap that the whole polygon shows is not drawn twice', () => {
    const wide = sumOf([terminal('one', 500, 0), terminal('two', 500, 90)])!;
    expect(closingPicture(wide, BOX)).toBeUndefined();
  });

  it('currents that cancel exactly leave nothing to magnify', () => {
    const balanced = sumOf([terminal('one', 0, 0), terminal('two', 0, 0)])!;
    expect(closingPicture(balanced, BOX)).toBeUndefined();
    expect(wholePicture(balanced, BOX).differential).toBeUndefined();
  });
});
