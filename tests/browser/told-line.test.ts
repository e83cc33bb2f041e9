import { readFile } from 'node:fs/promises';
import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { storedStory, storyDay } from '../store/told-history';
import { browsedSite } from './browsed-site';
import { signedInPage } from './signed-in-page';

/** Phase B's transformer at Rimside gave way to another one, 40 days ago. */
const REPLACED = 'dunmarsh-rimside';
const REPLACED_ON = storyDay(41);
/** Silent for a month, and back for two days. */
const SILENT = 'rimside-dunmarsh-east';
const DAYS = 100;
const SILENT_DAYS = 35;
const TEST_MS = 90_000;

const browsed = browsedSite(async (store) => {
  await storedStory(store, REPLACED, DAYS);
  await storedStory(store, SILENT, SILENT_DAYS);
});

const engineerAt = (path: string): Promise<Page> => signedInPage(browsed, { role: 'engineer', path });

describe('the page of a line', () => {
  it(
    'draws what the level consists of, and gives its figures with intervals',
    { timeout: TEST_MS },
    async () => {
      const page = await engineerAt(`/lines/${REPLACED}?phase=b`);
      const why = page.locator('section[aria-labelledby=why-title]');
      await why.getByRole('img', { name: /^Laid head to tail, charging .* ratio .* lead to the/ }).waitFor();
      const causes = why.getByRole('table', { name: /causes of the standing level/i });
      expect(await causes.getByRole('row').allInnerTexts()).toEqual(
        expect.arrayContaining([expect.stringMatching(/charging/i), expect.stringMatching(/ratio/i)]),
      );
      await page
        .getByText(/stepped from/i)
        .first()
        .waitFor();
    },
  );

  it(
    'shows causes by day and the trend of two years, each with its table behind it',
    { timeout: TEST_MS },
    async () => {
      const page = await engineerAt(`/lines/${REPLACED}?phase=b&span=years`);
      for (const [title, least] of [
        [/^The causes by day/, 20],
        [/^Standing differential/, DAYS - 2],
      ] as const) {
        const panel = page.locator('section.panel', { has: page.getByRole('heading', { name: title }) });
        await panel.getByRole('img', { name: title }).locator('svg').waitFor();
        await panel.getByRole('button', { name: 'Table' }).click();
        const rows = panel.getByRole('region').getByRole('row');
        await rows.nth(1).waitFor();
        expect(await rows.count()).toBeGreaterThan(least);
        const [saved] = await Promise.all([
          page.waitForEvent('download'),
          panel.getByRole('button', { name: 'Save as CSV' }).click(),
        ]);
        const lines = (await readFile(await saved.path(), 'utf8')).trimEnd().split('\r\n');
        expect(lines.length).toBe(await rows.count());
      }
    },
  );

  it('says in words that causes are not separable, and draws nothing', { timeout: TEST_MS }, async () => {
    const page = await engineerAt(`/lines/${SILENT}?phase=a`);
    const why = page.locator('section[aria-labelledby=why-title]');
    await why.getByText('Not separable in this window.').waitFor();
    expect(await why.getByRole('img', { name: /^Laid/ }).count()).toBe(0);
    expect(await why.getByRole('table').count()).toBe(0);
  });
});

describe('before and after a date', () => {
  const sentences = async (page: Page, day: string): Promise<string[]> => {
    await page.getByLabel('Date of the work or the change').fill(day);
    await page.getByRole('button', { name: 'Compare', exact: true }).click();
    await page.waitForURL(new RegExp(`at=${day}`));
    const told = await page.getByText(/of phase [ABC]|For phase [ABC]/).allInnerTexts();
    return told.map((one) => one.replaceAll('\u00a0', ' '));
  };

  it(
    'the phase of the transformer replaced is told apart, with its interval and its cause',
    { timeout: TEST_MS },
    async () => {
      const page = await engineerAt(`/lines/${REPLACED}/compare`);
      const [a, b, c] = await sentences(page, REPLACED_ON);
      expect(b).toMatch(/phase B .* is higher by 2\.\d A \(95 %: 2\.\d to 2\.\d\), p < 0\.0001/);
      for (const other of [a, c]) expect(other).toContain('no shift');
      await page.getByRole('heading', { name: 'What phase B consisted of' }).waitFor();
      // the truth: −2.6 % at Rimside, where there had been an error within the class
      const ratio = page.getByRole('row', { name: /^ratio of Rimside/ });
      expect(await ratio.innerText()).toMatch(
        /within the class budget.*−2\.\d+\s%.*beyond the class budget/s,
      );
    },
  );

  it('too few days on a side are said in words, and no number is given', { timeout: TEST_MS }, async () => {
    const page = await engineerAt(`/lines/${REPLACED}/compare`);
    const told = await sentences(page, storyDay(2));
    expect(told).toHaveLength(3);
    for (const one of told) {
      expect(one).toMatch(/after it: too few to tell/);
      expect(one).not.toMatch(/\d\sA\b/);
    }
  });
});
