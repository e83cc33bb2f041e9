import { describe, expect, test } from 'vitest';
import { addSnapshot, currentSquares, emptySums } from '../../src/standing/composition-sums';
import { movedTerminal } from '../../src/standing/moved-terminal';
import { phaseUnbalance } from '../../src/standing/phase-unbalance';
import { polar, snapshotOf } from './made-up-phase';

const steady = (values: readonly number[], days = 20) =>
  Array.from({ length: days }, (_, day) => values.map((value) => value + 0.0005 * Math.sin(day * 2.3)));

describe('three terminals', () => {
  test('name the one whose mismatch changed', () => {
    expect(movedTerminal([0.001, 0.02])).toEqual({ kind: 'terminal', terminal: 2 });
    expect(movedTerminal([-0.02, 0.002])).toEqual({ kind: 'terminal', terminal: 1 });
  });

  test('name the first where all others changed alike against it', () => {
    expect(movedTerminal([0.02, 0.019])).toEqual({ kind: 'terminal', terminal: 0 });
  });

  test('name none where two of them changed by themselves', () => {
    expect(movedTerminal([0.02, 0.01])).toEqual({ kind: 'between', terminal: 1, against: 0 });
  });
});

describe('two terminals', () => {
  const before = steady([0.01, 0.01]);

  test('alone tell only that they differ', () => {
    expect(movedTerminal([0.02])).toEqual({ kind: 'between', terminal: 1, against: 0 });
  });

  test('name the one whose unbalance changed with the mismatch', () => {
    expect(movedTerminal([0.02], { before, after: steady([0.01, 0.03]) })).toEqual({
      kind: 'terminal',
      terminal: 1,
    });
    expect(movedTerminal([0.02], { before, after: steady([-0.01, 0.01]) })).toEqual({
      kind: 'terminal',
      terminal: 0,
    });
  });

  test('name none where the load’s unbalance moved as well', () => {
    expect(movedTerminal([0.02], { before, after: steady([0.0, 0.02]) })?.kind).toBe('between');
  });

  test('name none where the unbalance moved by something else than this mismatch', () => {
    expect(movedTerminal([0.02], { before, after: steady([0.01, 0.07]) })?.kind).toBe('between');
  });

  test('name none where the unbalance scatters as much as the mismatch changed', () => {
    const scattered = (values: readonly number[]) =>
      Array.from({ length: 20 }, (_, day) => values.map((value) => value + 0.01 * Math.sin(day * 2.3)));
    const sides = { before: scattered([0.01, 0.01]), after: scattered([0.01, 0.03]) };
    expect(movedTerminal([0.02], sides)?.kind).toBe('between');
  });

  test('name none by a handful of days', () => {
    expect(movedTerminal([0.02], { before, after: steady([0.01, 0.03], 4) })?.kind).toBe('between');
  });
});

test('nothing that changed is nowhere', () => expect(movedTerminal([0, 0])).toBeUndefined());

describe('the unbalance of a phase', () => {
  const sumsOf = (throughAmps: number, ratio: number) => {
    const sums = emptySums({ terminalCount: 2, hasVoltage: true });
    for (const turnRad of [0, 1, 2])
      addSnapshot(
        sums,
        snapshotOf(
          { susceptanceMillisiemens: 0.05, mismatches: [{ re: ratio, im: 0 }] },
          { voltageKv: 63.5, throughAmps, lagRad: 0.2, turnRad },
        ),
      );
    return sums;
  };

  test('is in every terminal’s value alike where it is the load’s', () => {
    const [first, second] = phaseUnbalance(sumsOf(412, 0), [sumsOf(400, 0), sumsOf(400, 0)])!;
    expect(first).toBeCloseTo(Math.log(412 / 400), 3);
    expect(second).toBeCloseTo(first!, 3);
  });

  test('is in one terminal’s value where it is a transformer’s', () => {
    const [first, second] = phaseUnbalance(sumsOf(400, 0.02), [sumsOf(400, 0), sumsOf(400, 0)])!;
    expect(first).toBeCloseTo(0, 9);
    expect(second).toBeCloseTo(Math.log(1.02), 9);
  });

  test('is not told without snapshots or with another number of terminals', () => {
    const empty = emptySums({ terminalCount: 2, hasVoltage: true });
    const three = emptySums({ terminalCount: 3, hasVoltage: true });
    expect(phaseUnbalance(empty, [empty, empty])).toBeUndefined();
    expect(phaseUnbalance(sumsOf(400, 0), [sumsOf(400, 0), three])).toBeUndefined();
  });
});

test('squares of a terminal’s current are those of its phasors, the first one’s too', () => {
  const sums = emptySums({ terminalCount: 3, hasVoltage: false });
  const [first, second, third] = [polar(300, 0.2), polar(120, 2.9), polar(190, -2.8)];
  addSnapshot(sums, {
    differentialAmps: { re: first.re + second.re + third.re, im: first.im + second.im + third.im },
    voltageKv: undefined,
    otherCurrentsAmps: [second, third],
    throughAmps: 300,
  });
  [300, 120, 190].forEach((amps, terminal) =>
    expect(currentSquares(sums, terminal)).toBeCloseTo(amps ** 2, 6),
  );
  expect(() => currentSquares(sums, 3)).toThrow('none at place 3');
});
