import { connectAsync } from 'mqtt';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { lineCompositionSchema } from '../../src/contract/composition';
import { levelListSchema } from '../../src/contract/lines';
import { MARGINS_A_PAGE, marginScatterSchema } from '../../src/contract/margins';
import { resultTopic } from '../../src/contract/result';
import { MARGIN_SORTS, marginListSchema } from '../../src/contract/standing';
import { resultOf } from '../live/made-up-result';
import type { Store } from '../../src/store/client';
import { type Mosquitto, startMosquitto } from '../mosquitto';
import { type Caller, type RunningSite, signedIn, startSite } from '../running-site';
import { madeUpLineOf, storedFleet } from '../store/made-up-fleet';
import { storedDays } from '../store/made-up-history';

/** The production build over a large fleet, asked over HTTP as a browser asks. */
const LINES = 2_000;
const PAGES_MOST = (3 * LINES) / MARGINS_A_PAGE;
const LIMIT_MS = 300;
const TREND_LIMIT_MS = 100;
const LATER_CALLS = 7;
const DAY_MS = 86_400_000;
const MIDNIGHT_MS = Math.floor(Date.now() / DAY_MS) * DAY_MS;
const LINES_OF_TWO_YEARS = 12;

let mosquitto: Mosquitto;
let site: RunningSite;
let engineer: Caller;

beforeAll(async () => {
  mosquitto = await startMosquitto();
  await publishResults(mosquitto.url);
  const filled = async (store: Store) => {
    await storedFleet(store, LINES);
    const midnight = new Date(MIDNIGHT_MS);
    await storedDays(store, { midnight, days: 60 });
    await storedDays(store, { midnight, days: 731, lines: LINES_OF_TWO_YEARS });
  };
  site = await startSite(mosquitto.url, [], { filled, webOnly: true });
  engineer = await signedIn(site.address, 'engineer');
}, 240_000);
afterAll(async () => {
  await site.close();
  await mosquitto.close();
});

/** Every second line is heard. */
async function publishResults(url: string): Promise<void> {
  const client = await connectAsync(url);
  const at = new Date().toISOString();
  for (let index = 0; index < LINES; index += 2) {
    const { key } = madeUpLineOf(index);
    const result = { ...resultOf(key, index % 97), at, publishedAt: at };
    await client.publishAsync(resultTopic(key), JSON.stringify(result), { retain: true });
  }
  await client.endAsync();
}

const levelsOf = (index: number): string =>
  `/api/lines/${madeUpLineOf(index).key}/levels?rung=day&from=${new Date(MIDNIGHT_MS - 731 * DAY_MS).toISOString()}&to=${new Date(MIDNIGHT_MS).toISOString()}`;

interface Question {
  readonly name: string;
  readonly path: string;
  readonly holds: (answer: string) => boolean;
  readonly limitMs: number;
}

const list = (name: string, query: string): Question => ({
  name: `margins, ${name}`,
  path: `/api/margins?${query}`,
  holds: (answer) => marginListSchema.parse(JSON.parse(answer)).rows.length > 0,
  limitMs: LIMIT_MS,
});

/** Lines that a page's document shows. */
const listedLines = (html: string): number => html.match(/<li data-line=/g)?.length ?? 0;

const QUESTIONS: readonly Question[] = [
  list('first page', ''),
  ...MARGIN_SORTS.map((sort) => list(`by ${sort}`, `sort=${sort}`)),
  list('one word', 'text=esk'),
  list('every filter', 'text=esk&substation=holm&voltage=220&creep=none&owner=Holm+Networks'),
  {
    name: 'scatter',
    path: '/api/margins/scatter',
    holds: (answer) => marginScatterSchema.parse(JSON.parse(answer)).points.length > LINES,
    limitMs: LIMIT_MS,
  },
  {
    name: 'Margins, the page',
    path: '/margins',
    holds: (answer) => answer.includes('6,000'),
    limitMs: LIMIT_MS,
  },
  {
    name: 'Forecast, the page',
    path: '/forecast',
    holds: (answer) => listedLines(answer) > 60,
    limitMs: LIMIT_MS,
  },
  ...[3, 4, 5].map((index) => ({
    name: `two-year trend of line ${index}`,
    path: levelsOf(index),
    holds: (answer: string) => levelListSchema.parse(JSON.parse(answer)).levels.length === 3 * 731,
    limitMs: TREND_LIMIT_MS,
  })),
  {
    name: 'causes of two years',
    path: levelsOf(6).replace('levels?rung=day&', 'composition?'),
    holds: (answer) => lineCompositionSchema.safeParse(JSON.parse(answer)).success,
    limitMs: LIMIT_MS,
  },
  {
    name: 'a line, the page',
    path: `/lines/${madeUpLineOf(7).key}`,
    holds: (answer) => answer.includes(madeUpLineOf(7).name),
    limitMs: LIMIT_MS,
  },
];

/** A page far down, found as a person gets there: from one to the next. */
async function pageAt(name: string, query: string, pages: number): Promise<Question> {
  const asked = new URLSearchParams(query);
  for (let page = 1; page < pages; page += 1) {
    const { next } = marginListSchema.parse(await (await engineer.get(`/api/margins?${asked}`)).json());
    if (next === null) throw new Error(`The list ends at page ${page}.`);
    asked.set('after', next);
  }
  return list(name, asked.toString());
}

async function timed({ path, holds, name }: Question): Promise<number> {
  const beganMs = performance.now();
  const response = await engineer.get(path);
  const answer = await response.text();
  const tookMs = performance.now() - beganMs;
  expect(response.status, name).toBe(200);
  expect(holds(answer), name).toBe(true);
  return tookMs;
}

const median = (values: readonly number[]): number =>
  values.toSorted((one, other) => one - other)[Math.floor(values.length / 2)]!;

describe(`with ${LINES} lines of three phases`, () => {
  it(
    'every question about the fleet is answered in time, the trend of a line faster',
    { timeout: 240_000 },
    async () => {
      const firsts = new Map<string, number>();
      for (const question of QUESTIONS) firsts.set(question.name, await timed(question));
      const farDown = [
        await pageAt('page 60', 'sort=shareOfPickup', 60),
        await pageAt('last page', 'sort=shareOfPickup', PAGES_MOST),
        await pageAt('last page by line', 'sort=lineName', PAGES_MOST),
        await pageAt('last page by utilisation', 'sort=utilisation', PAGES_MOST),
      ];
      for (const question of farDown) firsts.set(question.name, await timed(question));
      const told: string[] = [];
      const slow: string[] = [];
      for (const question of [...QUESTIONS, ...farDown]) {
        const later: number[] = [];
        for (let call = 0; call < LATER_CALLS; call += 1) later.push(await timed(question));
        const { name, limitMs } = question;
        told.push(
          `${name.padEnd(34)} first ${firsts.get(name)!.toFixed(0).padStart(5)} ms, later median ${median(later).toFixed(0).padStart(4)}, worst ${Math.max(
            ...later,
          )
            .toFixed(0)
            .padStart(4)}`,
        );
        if (median(later) > limitMs) slow.push(name);
      }
      console.log(told.join('\n'));
      expect(slow).toEqual([]);
    },
  );
});
