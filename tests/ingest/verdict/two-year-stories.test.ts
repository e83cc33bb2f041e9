import { describe, expect, it } from 'vitest';
import { storyTruths } from '../../../simulator/stories/story-lines';
import { toldTruths, type ToldTruth } from '../../../simulator/stories/told-truth';
import type { StandingVerdict } from '../../../src/contract/standing';
import { HISTORY_DAYS } from '../../../src/ingest/verdict/line-history';
import { countedDrift } from '../../../src/view/counted-drift';
import { demoHistoryOf, demoRosterLine, verdictOf } from '../demo-history';

// in the coldest weeks: a seasonal load has risen for half a year
const EPOCH_MS = Date.UTC(2026, 0, 12);
const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;
const told = toldTruths(storyTruths, EPOCH_MS);

/** What the product says of every phase of a line, beside what is so. */
function looksAt(line: string, nowMs = EPOCH_MS): { truth: ToldTruth; verdict: StandingVerdict }[] {
  const roster = demoRosterLine(line);
  const history = demoHistoryOf(roster, {
    nowMs,
    epochMs: EPOCH_MS,
    days: HISTORY_DAYS.drift,
    sampleMs: 1_800_000,
  });
  return told
    .filter((truth) => truth.line === line)
    .map((truth) => {
      return { truth, verdict: verdictOf(roster, history, truth.phase) };
    });
}

type Looks = ReturnType<typeof looksAt>;
const withCause = (looks: Looks): Looks => looks.filter(({ truth }) => truth.cause !== null);
const without = (looks: Looks): Looks => looks.filter(({ truth }) => truth.cause === null);

function expectNothing(looks: Looks): void {
  for (const { truth, verdict } of looks)
    expect([verdict.creepAtReference, verdict.step], `${truth.line} ${truth.phase}`).toEqual([null, null]);
}

/** Terminals that a verdict lays a cause on: one, or two of which it can’t be told. */
const placeOf = ({ causePlace }: StandingVerdict): (string | null)[] =>
  causePlace === null ? [] : [causePlace.terminal, causePlace.against];

describe.each([
  ['a ratio that creeps', 'dunmarsh-oxhollow'],
  ['a ratio that creeps at the first terminal', 'calder-stye-oxhollow'],
  ['charging that grows', 'rimside-pellan-cross'],
  ['a clock that runs behind', 'rimside-calder-stye'],
  ['a ratio that creeps, with a month’s gap in its history', 'oxhollow-pellan-cross'],
])('%s', (_, line) => {
  const looks = looksAt(line);

  it('is named by cause and terminal, its rise at one load no more than was injected', () => {
    expect(withCause(looks).length).toBeGreaterThan(0);
    for (const { truth, verdict } of withCause(looks)) {
      expect(verdict.likelyCause, truth.phase).toBe(truth.cause);
      // the phases’ unbalance tells the one terminal from the other; of time only both can be said
      if (truth.cause === 'ratio mismatch')
        expect(placeOf(verdict), truth.phase).toEqual([truth.terminal, null]);
      else if (truth.terminal !== null) expect(placeOf(verdict), truth.phase).toContain(truth.terminal);
      expect(verdict.causeIsTime, truth.phase).toBe(truth.cause === 'angle mismatch');
      const { slopeAmpsPerMonth } = verdict.creepAtReference!.creep;
      expect(slopeAmpsPerMonth / truth.slopeAmpsPerMonth!, truth.phase).toBeGreaterThan(0.7);
      expect(slopeAmpsPerMonth / truth.slopeAmpsPerMonth!, truth.phase).toBeLessThan(1.05);
      expect(verdict.step, truth.phase).toBeNull();
    }
  });

  it('leaves the other phases alone', () => expectNothing(without(looks)));
});

describe('a transformer replaced', () => {
  const looks = looksAt('dunmarsh-rimside');
  const { truth, verdict } = withCause(looks)[0]!;

  it('is named by cause, terminal and hour, and not as a creep', () => {
    expect([verdict.likelyCause, ...placeOf(verdict)]).toEqual([truth.cause, truth.terminal, null]);
    expect(Math.abs(Date.parse(verdict.step!.at) - Date.parse(truth.stepAt!))).toBeLessThanOrEqual(HOUR_MS);
    expect(verdict.creepAtReference).toBeNull();
  });

  it('has its step named by cause and terminal too', () => {
    expect(verdict.step).toMatchObject({
      cause: truth.cause,
      place: { terminal: truth.terminal, against: null },
    });
  });

  it('leaves the other phases alone', () => expectNothing(without(looks)));
});

describe('a channel that takes another path', () => {
  it('is named by cause, terminal and hour in every phase, and not as a creep', () => {
    for (const { truth, verdict } of looksAt('dunmarsh-pellan-cross')) {
      expect([verdict.likelyCause, verdict.causeIsTime]).toEqual([truth.cause, true]);
      expect(placeOf(verdict)).toEqual([truth.terminal, 'dunmarsh']);
      expect(verdict.step).toMatchObject({
        cause: truth.cause,
        place: verdict.causePlace,
        isTime: true,
        channelPathChanged: true,
      });
      expect(Math.abs(Date.parse(verdict.step!.at) - Date.parse(truth.stepAt!))).toBeLessThanOrEqual(HOUR_MS);
      expect(verdict.creepAtReference).toBeNull();
    }
  });
});

describe.each([
  ['growth of load alone', 'oxhollow-rimside'],
  ['a seasonal load', 'pellan-cross-calder-stye'],
  ['both together', 'calder-stye-dunmarsh'],
])('%s', (_, line) => {
  const looks = looksAt(line);

  it('is neither creep at reference load nor a step', () => {
    expect(looks).toHaveLength(3);
    expectNothing(looks);
  });

  // each of them stands at 5 to 8 A with 6.4 A of charging, the most of any part
  it('leaves the largest part as the cause', () => {
    for (const { truth, verdict } of looks) expect(verdict.likelyCause, truth.phase).toBe('charging');
  });
});

describe('a terminal silent for a month', () => {
  it.each([
    ['two days after its return', 0],
    ['in its last days', -4],
  ])('is answered in words, without a cause, %s', (_, day) => {
    for (const { truth, verdict } of looksAt('rimside-dunmarsh-east', EPOCH_MS + day * DAY_MS)) {
      expect(verdict.composition, truth.phase).toMatchObject({
        kind: 'not separable',
        reason: expect.stringMatching(/[.]$/) as string,
      });
      expect([verdict.likelyCause, verdict.causePlace], truth.phase).toEqual(['not told', null]);
      expect([verdict.creepAtReference, verdict.step], truth.phase).toEqual([null, null]);
      expect(countedDrift(verdict), truth.phase).toBeUndefined();
      expect(verdict.levelAmps === null, truth.phase).toBe(day < 0);
    }
  });

  it('is answered from what there was before it, in its midst', () => {
    for (const { truth, verdict } of looksAt('rimside-dunmarsh-east', EPOCH_MS - 17 * DAY_MS)) {
      if (verdict.composition.kind !== 'separated') throw new Error(verdict.composition.reason);
      const { chargingAmps, expectedChargingAmps } = verdict.composition;
      expect(Math.abs(chargingAmps!.value / expectedChargingAmps! - 1), truth.phase).toBeLessThan(0.02);
      expect(verdict.levelAmps, truth.phase).toBeNull();
      expect([verdict.creepAtReference, verdict.step], truth.phase).toEqual([null, null]);
    }
  });
});
