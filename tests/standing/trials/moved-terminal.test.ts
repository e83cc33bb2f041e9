import { expect, test } from 'vitest';
import { createPlant } from '../../../simulator/plant/plant';
import type { LineTruth } from '../../../simulator/plant/truth';
import { storyTruths } from '../../../simulator/stories/story-lines';
import { mismatchFrom } from '../../../src/standing/composition';
import { fittedCoefficients } from '../../../src/standing/composition-fit';
import {
  addSnapshot,
  type CompositionSums,
  emptySums,
  totalOf,
} from '../../../src/standing/composition-sums';
import { movedTerminal } from '../../../src/standing/moved-terminal';
import { phaseUnbalance } from '../../../src/standing/phase-unbalance';
import { uniform } from './seeded-line';

const LINES = 200;
const SIDE_DAYS = 14;
const DAY_MS = 86_400_000;
const EPOCH_MS = Date.UTC(2026, 2, 2);
const base = storyTruths.find(({ key }) => key === 'dunmarsh-oxhollow')!;

interface Case {
  readonly truth: LineTruth;
  readonly place: 0 | 1;
  readonly phase: 0 | 1 | 2;
}

/** A line one of whose transformers, at either end, gave way to one of 0.6 to 3 % more or less on day 0. */
function drawn(seed: number): Case {
  const random = uniform(seed * 6700417 + 5);
  const place = random() < 0.5 ? 0 : 1;
  const phase = Math.floor(3 * random()) as 0 | 1 | 2;
  const change = (random() < 0.5 ? -1 : 1) * (0.006 + 0.024 * random());
  const terminals = base.terminals.map((terminal, index) => {
    const old = terminal.ctErrors[phase];
    const error = { ratio: old.ratio + change, angleRad: old.angleRad };
    return index === place ? { ...terminal, replaced: { phase, atDay: 0, error } } : terminal;
  });
  const { ratioDrift: _drift, ...rest } = base;
  return { truth: { ...rest, key: `line-${seed}`, terminals }, place, phase };
}

/** The day sums of all three phases by what the terminals measure every hour. */
function daySums({ truth }: Case, day: number): CompositionSums[] {
  const plant = createPlant([truth], { seed: 1, epochMs: EPOCH_MS });
  const sums = [0, 1, 2].map(() => emptySums({ terminalCount: 2, hasVoltage: true }));
  for (let hour = 0; hour < 24; hour++) {
    const { terminals } = plant.state(truth.key, EPOCH_MS + day * DAY_MS + hour * 3_600_000);
    ([0, 1, 2] as const).forEach((phase) => {
      const [first, second] = [terminals[0]!.amps[phase], terminals[1]!.amps[phase]];
      const { re, im } = terminals[0]!.volts[phase];
      addSnapshot(sums[phase]!, {
        differentialAmps: { re: first.re + second.re, im: first.im + second.im },
        voltageKv: { re: re / 1000, im: im / 1000 },
        otherCurrentsAmps: [second],
        throughAmps: Math.hypot(second.re, second.im),
      });
    });
  }
  return sums;
}

function found(drawnCase: Case): 'right' | 'wrong' | 'not told' {
  const { phase, place } = drawnCase;
  const side = (from: number) =>
    Array.from({ length: SIDE_DAYS }, (_, index) => daySums(drawnCase, from + index));
  const [before, after] = [side(-SIDE_DAYS), side(1)];
  const ratioOf = (days: readonly (readonly CompositionSums[])[]) =>
    mismatchFrom(fittedCoefficients(totalOf(days.map((each) => each[phase]!))!)![1]!).re;
  const others = [0, 1, 2].filter((each) => each !== phase);
  const unbalanceOf = (days: readonly (readonly CompositionSums[])[]) =>
    days.map((each) => phaseUnbalance(each[phase]!, [each[others[0]!]!, each[others[1]!]!])!);
  const moved = movedTerminal([ratioOf(after) - ratioOf(before)], {
    before: unbalanceOf(before),
    after: unbalanceOf(after),
  });
  if (moved?.kind !== 'terminal') return 'not told';
  return moved.terminal === place ? 'right' : 'wrong';
}

test('of two terminals the one whose transformer was replaced is named, or none is', () => {
  const cases = Array.from({ length: LINES }, (_, index) => found(drawn(index + 1)));
  const share = (kind: string) => cases.filter((each) => each === kind).length / LINES;
  console.table({
    '0.6 to 3 % more or less at either of two terminals': {
      lines: LINES,
      right: share('right'),
      'not told': share('not told'),
      wrong: share('wrong'),
    },
  });
  expect(share('right')).toBeGreaterThanOrEqual(0.9);
  expect(share('wrong')).toBe(0);
}, 120_000);
