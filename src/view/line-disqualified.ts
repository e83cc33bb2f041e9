import type { Level } from '../contract/lines';
import type { Disqualification } from '../standing/qualification';
import { listed } from './line-words';
import type { PhaseName } from './phase';
import type { TrendWindow } from './trend-span';

/** How many snapshots of a window counted towards the standing levels, and which rules kept the others from it. */
export interface Uncounted {
  readonly allCount: number;
  readonly qualifiedCount: number;
  readonly reasons: readonly { readonly reason: string; readonly count: number }[];
  /** rows in which nothing qualified */
  readonly emptyRows: number;
  /** some rows are of before the rules were counted */
  readonly isPartial: boolean;
}

type CountedLevel = Pick<
  Level,
  'start' | 'phase' | 'medianAmps' | 'qualifiedCount' | 'allCount' | 'disqualified'
>;

/** The counts of one phase over the rows that start inside the window, the most frequent rule first. */
export function uncounted(
  levels: readonly CountedLevel[],
  phase: PhaseName,
  { fromMs, toMs }: TrendWindow,
): Uncounted {
  const rows = levels.filter((level) => {
    const startMs = Date.parse(level.start);
    return level.phase === phase && startMs >= fromMs && startMs < toMs;
  });
  const total = (of: (level: CountedLevel) => number) => rows.reduce((sum, row) => sum + of(row), 0);
  const counts = new Map<string, number>();
  for (const { disqualified } of rows)
    for (const [reason, count] of Object.entries(disqualified ?? {}))
      counts.set(reason, (counts.get(reason) ?? 0) + count);
  return {
    allCount: total((row) => row.allCount),
    qualifiedCount: total((row) => row.qualifiedCount),
    reasons: [...counts]
      .map(([reason, count]) => ({ reason, count }))
      .filter(({ count }) => count > 0)
      .sort((one, other) => other.count - one.count),
    emptyRows: rows.filter((row) => row.qualifiedCount === 0 && row.allCount > 0).length,
    isPartial: rows.some((row) => row.disqualified === null && row.qualifiedCount < row.allCount),
  };
}

/** Each rule as what a snapshot that broke it had. */
const RULES: Readonly<Record<Disqualification, string>> = {
  incomplete: 'without a measurement of every terminal',
  validity: 'with a measurement not marked good',
  test: 'with a terminal under test',
  clock: 'with a clock beyond its limit',
  breaker: 'with a breaker open',
  'through current': 'with a load too small or too great',
  unsteady: 'with a load that changed too much since the one before',
};

const ruleWords = (reason: string): string => RULES[reason as Disqualification] ?? `by the rule “${reason}”`;
const figure = (count: number): string => count.toLocaleString('en-GB');

/**
 * Why snapshots are missing from the levels shown, in a sentence or two; undefined where all counted. `rung` names
 * the rows: "3 hours have no level".
 */
export function uncountedWords(counts: Uncounted, rung: 'hour' | 'day'): string | undefined {
  const missing = counts.allCount - counts.qualifiedCount;
  if (missing <= 0) return undefined;
  const parts = counts.reasons.map(({ reason, count }) => `${figure(count)} ${ruleWords(reason)}`);
  const several = counts.reasons.reduce((sum, { count }) => sum + count, 0) > missing;
  const lead = `${figure(missing)} of ${figure(counts.allCount)} snapshots did not count towards these levels`;
  const because = parts.length === 0 ? '' : `: ${listed(parts)}`;
  const empty =
    counts.emptyRows === 0
      ? ''
      : ` ${figure(counts.emptyRows)} ${counts.emptyRows === 1 ? `${rung} has` : `${rung}s have`} no level for it.`;
  const more = several ? ' One snapshot may break several rules.' : '';
  const old = counts.isPartial ? ' For a part of this time the rules were not counted yet.' : '';
  return `${lead}${because}.${empty}${more}${old}`;
}
