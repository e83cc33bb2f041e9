import { describe, expect, it } from 'vitest';
import { storyTruths } from '../../../simulator/stories/story-lines';
import { toldTruths } from '../../../simulator/stories/told-truth';
import { rowsOf } from '../../../src/ingest/verdict/line-history';
import { atItsMinute } from '../../../src/ingest/verdict/line-steps';
import { phaseStep } from '../../../src/ingest/verdict/phase-step';
import { demoHistoryOf, demoMinutesOf, demoRosterLine } from '../demo-history';

const EPOCH_MS = Date.UTC(2026, 0, 12);
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const told = toldTruths(storyTruths, EPOCH_MS);

/** A step as it is first told, two days after it came, and with its minute. */
function stepOf(key: string) {
  const line = demoRosterLine(key);
  const truth = told.find((each) => each.line === key && each.stepAt !== null)!;
  const nowMs = Math.ceil(Date.parse(truth.stepAt!) / DAY_MS + 2) * DAY_MS;
  const span = { nowMs, epochMs: EPOCH_MS, days: 30, sampleMs: 1_200_000 };
  const history = demoHistoryOf(line, span);
  const step = phaseStep(line, history, { phase: truth.phase, earlier: undefined })!;
  const hourMs = Date.parse(step.at);
  const minutes = demoMinutesOf(line, {
    fromMs: hourMs - 3 * HOUR_MS,
    toMs: hourMs + 4 * HOUR_MS,
    sampleMs: 20_000,
    epochMs: EPOCH_MS,
  });
  return { truth, step, history, minutes: rowsOf(minutes, truth.phase) };
}

describe.each([
  ['a transformer replaced', 'dunmarsh-rimside'],
  ['a channel that takes another path', 'dunmarsh-pellan-cross'],
])('%s', (_, key) => {
  const { truth, step, history, minutes } = stepOf(key);

  it('is told with its minute, hence its hour, where there are minutes', () => {
    const { at, ...rest } = atItsMinute(step, history, minutes);
    expect(Math.abs(Date.parse(at) - Date.parse(truth.stepAt!))).toBeLessThanOrEqual(60_000);
    expect(at.slice(0, 13)).toBe(truth.stepAt!.slice(0, 13));
    expect(rest).toEqual({ ...rest, cause: truth.cause });
  });

  it('keeps its hour where there are none, or only from before it', () => {
    expect(atItsMinute(step, history, [])).toEqual(step);
    const early = minutes.filter(({ start }) => start.getTime() < Date.parse(truth.stepAt!) - 300_000);
    expect(atItsMinute(step, history, early)).toEqual(step);
  });
});
