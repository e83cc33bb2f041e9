import { describe, expect, it } from 'vitest';
import type { Measurement } from '../../src/contract/feed';
import { resultSchema } from '../../src/contract/result';
import { computedSnapshot } from '../../src/ingest/computed-snapshot';
import { resultMessage } from '../../src/ingest/result-message';
import type { RegisteredLine } from '../../src/store/register';
import { AT_MS, balanced, iso, measurement, registeredLine, rosterLine } from './made-up-feed';

const NOW_MS = AT_MS + 130;

function published(
  sent: Readonly<Record<string, Measurement>> | undefined,
  change: Partial<RegisteredLine> = {},
) {
  const line = rosterLine(registeredLine(change));
  const measurements = sent && new Map(Object.entries(sent));
  const snapshot = measurements && computedSnapshot({ line, atMs: AT_MS, measurements }, 100);
  return resultMessage(line, snapshot, { condition: 'settled', nowMs: NOW_MS });
}
const loaded = { arden: measurement(), birk: measurement({ current: balanced(392, 180) }) };

describe('a published result', () => {
  it('carries the figures, the settings’ version and what each terminal sent', () => {
    const result = published(loaded);
    expect(result).toMatchObject({
      line: 'arden-birk',
      at: iso(AT_MS),
      publishedAt: iso(NOW_MS),
      condition: 'settled',
      reason: null,
      settingsVersion: 1,
    });
    expect(result.phases.a.differentialAmps).toBeCloseTo(8, 9);
    expect(result.phases.a.utilisation).toBeCloseTo(8 / 120, 9);
    expect(result.throughRatio).toBeCloseTo(0.396, 9);
    expect(result.terminals).toMatchObject([
      { key: 'arden', present: true, current: balanced(400, 0), voltage: null, validity: 'good' },
      { key: 'birk', present: true, current: balanced(392, 180) },
    ]);
  });

  const cases: [
    string,
    Readonly<Record<string, Measurement>> | undefined,
    Partial<RegisteredLine>,
    string | null,
  ][] = [
    ['of a complete snapshot', loaded, {}, null],
    [
      'of one that lacks a terminal',
      { arden: measurement() },
      {},
      'Birk sent nothing for this instant, so no differential can be computed.',
    ],
    [
      'of one of which nothing came',
      {},
      {},
      'Arden and Birk sent nothing for this instant, so no differential can be computed.',
    ],
    [
      'of an invalid one',
      { ...loaded, arden: measurement({ validity: 'invalid' }) },
      {},
      'Arden marks its measurement invalid, so no differential is computed from it.',
    ],
    [
      'of a free clock',
      { ...loaded, arden: measurement({ clock: { source: 'free', error_us: 1 } }) },
      {},
      'The clock of Arden runs free, so its phasors have no common time with the others.',
    ],
    ['of a line without settings', loaded, { settings: [] }, 'The register holds no settings for this line.'],
    [
      'of a line out of service',
      loaded,
      { inService: false },
      'The register says that this line is out of service.',
    ],
    ['before anything was heard', undefined, {}, 'Nothing has been heard of this line yet.'],
  ];

  it.each(cases)('%s gives its reason and is of the contract’s form', (_, sent, change, reason) => {
    const result = published(sent, change);
    expect(result.reason).toBe(reason);
    expect(resultSchema.parse(JSON.parse(JSON.stringify(result)))).toEqual(result);
  });

  it('that cannot be computed is null throughout, never 0', () => {
    const result = published({ arden: measurement() });
    for (const phase of ['a', 'b', 'c'] as const)
      expect(Object.values(result.phases[phase])).toEqual([null, null, null, null]);
    expect([result.throughAmps, result.throughRatio]).toEqual([null, null]);
    expect(result.terminals[1]).toMatchObject({ present: false, current: null, breaker: null });
  });
});
