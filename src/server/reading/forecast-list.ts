import { DONE_MOST } from '../../contract/follow-ups';
import type {
  ForecastHistory,
  ForecastLine,
  ForecastList,
  ForecastVerdict,
} from '../../contract/forecast-list';
import type { StandingVerdict } from '../../contract/standing';
import { groupedBy } from '../../store/grouped';
import { readFollowUps } from '../../store/follow-ups';
import {
  countForecastLines,
  readDailyLevels,
  readForecastKeys,
  readLineEnds,
  readMargins,
  type DailyLevels,
} from '../../store/margins';
import { phaseWords } from '../../view/forecast-words';
import { siteCustom } from '../../view/site-custom';
import type { Site } from '../site';

const DAY_MS = 86_400_000;
const HISTORY_DAYS = 60;
/** More phases than this are no work list any more, and their histories would make the page heavy. */
const PHASES_MOST = 400;

/** Lines that rise or stand beyond the near mark, most urgent first, with what is kept to be done about them. */
export async function readForecastList({ store, settings, now }: Site): Promise<ForecastList> {
  const nowMs = now();
  const from = new Date((Math.floor(nowMs / DAY_MS) - HISTORY_DAYS) * DAY_MS);
  const { NEAR_RATIO } = settings;
  const custom = siteCustom(settings);
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
    readDailyLevels(store, keys, from),
  ]);
  const daysOf = new Map(days.map((own) => [`${own.lineId} ${own.phase}`, own.days]));
  const lines = [...groupedBy(margins, ({ lineId }) => lineId)].map(([lineId, own]): ForecastLine => {
    const substations = [...(ends.get(lineId) ?? [])];
    return {
      key: own[0]!.key,
      name: own[0]!.lineName,
      owner: own[0]!.owner,
      voltageKv: own[0]!.voltageKv,
      substations,
      phases: own.map(({ phase, verdict, figures: { creepVerdict } }) => ({
        verdict: shown(verdict),
        creepVerdict,
        words: phaseWords({ verdict, creepVerdict }, { site: custom, nowMs, substations }),
        history: history(daysOf.get(`${lineId} ${phase}`) ?? [], from),
      })),
    };
  });
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

function history(days: DailyLevels['days'], from: Date): ForecastHistory | undefined {
  const first = days[0];
  const last = days.at(-1);
  if (first === undefined || last === undefined) return undefined;
  const levelsAmps = Array<number | null>(last[0] - first[0] + 1).fill(null);
  for (const [place, levelAmps] of days) levelsAmps[place - first[0]] = levelAmps;
  return {
    from: new Date(from.getTime() + first[0] * DAY_MS).toISOString().slice(0, 10),
    levelsAmps,
  };
}

/** What the page draws and sorts by; everything else of a verdict is in the words. */
const shown = ({
  phase,
  pickupAmps,
  shareOfPickup,
  likelyCause,
  near,
  pickup,
}: StandingVerdict): ForecastVerdict => ({ phase, pickupAmps, shareOfPickup, likelyCause, near, pickup });
