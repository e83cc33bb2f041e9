import { sql } from 'drizzle-orm';
import type { Page } from 'playwright-core';
import { expect, it } from 'vitest';
import { insertFollowUp } from '../../src/store/follow-ups';
import { type LevelRow, writeLevels } from '../../src/store/levels';
import { readRegisterLine } from '../../src/store/register';
import { recordedWork } from '../../src/store/schema/standing';
import { dateText } from '../../src/view/figures';
import { insertMadeUpLine, LINE } from '../faults/site-under-test';
import { levelRow } from '../store/made-up-levels';
import { nameOf } from '../running-site';
import { browsedSite } from './browsed-site';
import { signedInPage } from './signed-in-page';

const DAY_MS = 86_400_000;
const TODAY_MS = Math.floor(Date.now() / DAY_MS) * DAY_MS;
const DONE_ON = new Date(TODAY_MS - 20 * DAY_MS).toISOString().slice(0, 10);
const DONE_DAY = dateText(`${DONE_ON}T12:00:00Z`, 'UTC');

const browsed = browsedSite(async (store) => {
  await insertMadeUpLine(store);
  const { id } = (await readRegisterLine(store, LINE))!;
  await writeLevels(store, 'day', steadyLevels(id));
});

const steadyLevels = (lineId: number): LevelRow[] =>
  Array.from({ length: 40 }, (_, ago) =>
    levelRow({ lineId, phase: 'a', start: new Date(TODAY_MS - ago * DAY_MS) }, 20),
  );

/** A click on what the server drew does nothing before its island has woken up. */
const islandsAwake = (page: Page) =>
  page.waitForFunction(() => document.querySelector('astro-island[ssr]') === null);

it(
  'a planner ends a follow-up with what was done, finds it as a date to compare across, and withdraws it',
  { timeout: 120_000 },
  async () => {
    const site = browsed.site();
    await insertFollowUp(
      site.store,
      { line: 'anvil-birch', phase: 'b', cause: 'ratio mismatch', due: null, note: 'Look at the wiring.' },
      { by: { id: 'someone', name: 'Somebody Else' }, nowMs: Date.now() },
    );
    const page = await signedInPage(browsed, { role: 'planner', path: '/forecast' });
    await page.getByRole('heading', { name: 'Open follow-ups, 1' }).waitFor();

    await islandsAwake(page);
    await page.getByRole('button', { name: /^Done: Look at the wiring/ }).click();
    await page.getByLabel(/What was done/).fill('Secondary terminals tightened.');
    // a day to come is refused beside its field, and what was typed stays
    await page.getByLabel('Done on', { exact: true }).fill('2199-01-01');
    await page.getByRole('button', { name: 'End it and record the work' }).click();
    await page.getByText('This day has not come yet.').waitFor();
    await page.getByLabel('Done on', { exact: true }).fill(DONE_ON);
    await page.getByRole('combobox', { name: 'Where' }).selectOption({ label: 'Birch' });
    await page.getByRole('button', { name: 'End it and record the work' }).click();
    await page.getByRole('heading', { name: 'No open follow-ups' }).waitFor();

    const done = page.getByRole('region', { name: 'Follow-ups done last' });
    await done.getByText('work at Birch: Secondary terminals tightened.').waitFor();
    await done.getByRole('link', { name: `Compare Anvil – Birch before and after ${DONE_DAY}` }).click();
    await page.getByRole('heading', { name: new RegExp(`before and after ${DONE_DAY}`) }).waitFor();
    await page.getByText('Secondary terminals tightened.').waitFor();
    await page.getByText(new RegExp(`recorded by ${nameOf('planner')}`)).waitFor();

    const trend = page.getByRole('region', { name: 'Standing differential, phase A' });
    const marked = trend.getByRole('table', { name: 'Known changes marked above' });
    const openTable = async () => {
      await page.goto(`${site.address}/lines/${LINE}?span=years&phase=a`);
      await islandsAwake(page);
      await trend.getByRole('button', { name: 'Table' }).click();
    };
    await openTable();
    await trend.getByText('work', { exact: true }).waitFor();
    await marked.getByText('work at Birch: Secondary terminals tightened.').waitFor();
    await marked.getByRole('link', { name: `Compare before and after ${DONE_DAY}` }).click();
    await page.getByRole('heading', { name: new RegExp(`before and after ${DONE_DAY}`) }).waitFor();
    await islandsAwake(page);

    await page.getByRole('button', { name: 'Withdraw: Secondary terminals tightened.' }).click();
    await page.getByRole('button', { name: 'Withdraw it' }).click();
    await page.getByText(new RegExp(`withdrawn by ${nameOf('planner')}`)).waitFor();
    const [kept] = await site.store.db
      .select({
        withdrawn: sql<number>`sum(${recordedWork.withdrawnAt} is not null)`,
        all: sql<number>`count(*)`,
      })
      .from(recordedWork);
    expect([Number(kept!.withdrawn), Number(kept!.all)]).toEqual([1, 1]);

    await openTable();
    await trend.getByRole('columnheader', { name: 'known change' }).waitFor();
    expect(await marked.count()).toBe(0);
  },
);
