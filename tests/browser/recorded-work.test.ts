import { sql } from 'drizzle-orm';
import { expect, it } from 'vitest';
import { insertFollowUp } from '../../src/store/follow-ups';
import { recordedWork } from '../../src/store/schema/standing';
import { insertMadeUpLine } from '../faults/site-under-test';
import { emailOf, nameOf, PASSWORD } from '../running-site';
import { browsedSite } from './browsed-site';

const PATIENCE_MS = 20_000;

const browsed = browsedSite(insertMadeUpLine);

it(
  'a planner ends a follow-up with what was done, finds it as a date to compare across, and withdraws it',
  { timeout: 120_000 },
  async () => {
    await insertFollowUp(
      browsed.site().store,
      { line: 'anvil-birch', phase: 'b', cause: 'ratio mismatch', due: null, note: 'Look at the wiring.' },
      { by: { id: 'someone', name: 'Somebody Else' }, nowMs: Date.now() },
    );
    const context = await browsed.browser().newContext({ viewport: { width: 1440, height: 900 } });
    const page = await context.newPage();
    page.setDefaultTimeout(PATIENCE_MS);
    await page.goto(`${browsed.site().address}/forecast`);
    await page.getByLabel(/e-mail/i).fill(emailOf('planner'));
    await page.getByLabel(/password/i).fill(PASSWORD);
    await page.getByRole('button', { name: /sign in/i }).click();
    await page.getByRole('heading', { name: 'Open follow-ups, 1' }).waitFor();

    await page.getByRole('button', { name: /^Done: Look at the wiring/ }).click();
    await page.getByLabel(/What was done/).fill('Secondary terminals tightened.');
    // a day to come is refused beside its field, and what was typed stays
    await page.getByLabel('Done on', { exact: true }).fill('2199-01-01');
    await page.getByRole('button', { name: 'End it and record the work' }).click();
    await page.getByText('This day has not come yet.').waitFor();
    await page.getByLabel('Done on', { exact: true }).fill('2026-01-15');
    await page.getByRole('button', { name: 'End it and record the work' }).click();
    await page.getByRole('heading', { name: 'No open follow-ups' }).waitFor();

    await page.getByRole('link', { name: 'Compare before and after the work' }).click();
    await page.getByRole('heading', { name: /before and after 15 Jan 2026/ }).waitFor();
    await page.getByText('Secondary terminals tightened.').waitFor();
    await page.getByText(new RegExp(`recorded by ${nameOf('planner')}`)).waitFor();

    await page.getByRole('button', { name: 'Withdraw: Secondary terminals tightened.' }).click();
    await page.getByRole('button', { name: 'Withdraw it' }).click();
    await page.getByText(new RegExp(`withdrawn by ${nameOf('planner')}`)).waitFor();
    const [kept] = await browsed
      .site()
      .store.db.select({
        withdrawn: sql<number>`sum(${recordedWork.withdrawnAt} is not null)`,
        all: sql<number>`count(*)`,
      })
      .from(recordedWork);
    expect([Number(kept!.withdrawn), Number(kept!.all)]).toEqual([1, 1]);
  },
);
