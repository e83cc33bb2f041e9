import { describe, expect, it } from 'vitest';
import type { Result } from '../../src/contract/result';
import { boardCounts, boardLine, shownState } from '../../src/view/board';
import { heardTerminals } from '../../src/view/heard-terminals';
import { isStale } from '../../src/view/staleness';
import { AT, AT_MS, blindLine, lineWith } from './sample-lines';

describe('staleness', () => {
  it('begins after three missed periods and ten seconds on the way', () => {
    expect(isStale(AT_MS, AT_MS + 16_000)).toBe(false);
    expect(isStale(AT_MS, AT_MS + 16_001)).toBe(true);
  });

  it('holds for a value that never came', () => expect(isStale(undefined, AT_MS)).toBe(true));

  it('takes a settled line out of the settled ones', () => {
    const line = boardLine(lineWith(), AT_MS + 60_000);
    expect(shownState(line)).toBe('stale');
    expect(boardCounts([line])).toMatchObject({ settled: 0, stale: 1, all: 1 });
  });

  it('leaves a line that was near among the near ones, without its ink', () => {
    const line = boardLine(lineWith({ condition: 'near' }), AT_MS + 60_000);
    expect(line.stale).toBe(true);
    expect(shownState(line)).toBe('near');
  });

  it('is nothing that a blind line could add', () => {
    expect(boardLine(blindLine(), AT_MS + 60_000).stale).toBe(false);
  });
});

describe('heard terminals', () => {
  const terminal = (key: string, present: boolean) => ({
    key,
    present,
    current: null,
    voltage: null,
    frequencyHz: null,
    breaker: null,
    clock: null,
    channel: null,
    validity: null,
    test: false,
  });
  const result = (change: Partial<Result>): Result => {
    const { at, condition, reason, phases, throughAmps, throughRatio, compensation, settingsVersion } =
      lineWith();
    return {
      line: 'x',
      publishedAt: AT,
      ...{ at, condition, reason, phases, throughAmps, throughRatio, compensation, settingsVersion },
      terminals: [terminal('x', true), terminal('y', true)],
      ...change,
    };
  };

  it('are those in a snapshot that is not stale', () => {
    const results = [
      result({}),
      result({ terminals: [terminal('x', true), terminal('y', false)] }),
      result({ at: '2026-12-01T13:31:00.000Z' }),
    ];
    expect(heardTerminals(results, AT_MS + 800)).toEqual({ heardCount: 3, knownCount: 6, newestAtMs: AT_MS });
  });

  it('are not asked of lines out of service', () => {
    expect(heardTerminals([result({ condition: 'out of service', at: null })], AT_MS)).toEqual({
      heardCount: 0,
      knownCount: 0,
      newestAtMs: undefined,
    });
  });
});
