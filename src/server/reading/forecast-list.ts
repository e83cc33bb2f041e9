import type { CompositionOnWire } from '../../contract/composition';
import { DONE_MOST } from '../../contract/follow-ups';
import type { ForecastHistory, ForecastLine, ForecastList } from '../../contract/forecast-list';
import type { StandingVerdict } from '../../contract/standing';
import { groupedBy } from '../../store/grouped';
import { readFollowUps } from '../../store/follow-ups';
import {
  countForecastLines,
  readDailyLevels,
  readForecastKeys,
  readLineEnds,
  readMargins,
} from '../../store/margins';
import type { Site } from '../site';

const DAY_MS = 86_400_000;
const HISTORY_DAYS = 60;
/** More phases than this are no work list any more, and their histories would make the page heavy. */
const PHASES_MOST = 400;

/** Lines that rise or stand beyond the near mark, most urgent first, with what is kept to be done about them. */
export async function readForecastList({ store, settings, now }: Site): Promise<ForecastList> {
  const nowMs = now();
  const { NEAR_RATIO } = settings;
  const [keys, counts, followUps, doneFollowUps] = await Promise.all([
    readForecastKeys(store, NEAR_RATIO, PHASES_MOST),
    countForecastLines(store, NEAR_RATIO),
    readFollowUps(store, { state: 'open' }),
    readFollowUps(store, { state: 'done', limit: DONE_MOST }),
  ]);
  const lineIds = [...new Set(keys.map(({ lineId }) => lineId))];
  const [margins, ends, days] = await Promise.all([
    readMargins(store, keys),
    readLineEnds(store, lineIds),
    readDailyLevels(store, keys, new Date(nowMs - HISTORY_DAYS * DAY_MS)),
  ]);
  const daysOf = groupedBy(days, ({ lineId, phase }) => `${lineId} ${phase}`);
  const lines = [...groupedBy(margins, ({ lineId }) => lineId)].map(([lineId, own]): ForecastLine => ({
    key: own[0]!.key,
    name: own[0]!.lineName,
    owner: own[0]!.owner,
    voltageKv: own[0]!.voltageKv,
    substations: [...(ends.get(lineId) ?? [])],
    phases: own.map(({ phase, verdict, figures }) => ({
      verdict: withoutPolygons(verdict),
      creepVerdict: figures.creepVerdict,
      history: history(daysOf.get(`${lineId} ${phase}`) ?? []),
    })),
  }));
  const listed = counts.beyond + counts.coming + counts.withinMargin;
  return {
    at: new Date(nowMs).toISOString(),
    lines,
    beyondCount: counts.beyond,
    comingCount: counts.coming,
    steadyCount: counts.found - listed,
    unknownCount: counts.unknown,
    leftOutCount: listed - lines.length,
    followUps,
    doneFollowUps,
  };
}

type Day = Awaited<ReturnType<typeof readDailyLevels>>[number];

function history(days: readonly Day[]): ForecastHistory | undefined {
  const first = days[0];
  const last = days.at(-1);
  if (first === undefined || last === undefined) return undefined;
  const place = ({ start }: Day) => Math.round((start.getTime() - first.start.getTime()) / DAY_MS);
  const levelsAmps = Array<number | null>(place(last) + 1).fill(null);
  for (const day of days) levelsAmps[place(day)] = day.medianAmps === null ? null : tenths(day.medianAmps);
  return { from: first.start.toISOString().slice(0, 10), levelsAmps };
}

const tenths = (amps: number): number => Math.round(amps * 10) / 10;

/** The page draws no polygon: what it does not show, it is not sent. */
const withoutPolygons = (verdict: StandingVerdict): StandingVerdict => ({
  ...verdict,
  composition: bare(verdict.composition),
  compositionBefore: verdict.compositionBefore && bare(verdict.compositionBefore),
});

const bare = (found: CompositionOnWire): CompositionOnWire =>
  found.kind === 'separated' ? { ...found, polygon: null } : found;
