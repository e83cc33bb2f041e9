import { describe, expect, it } from 'vitest';
import { storedFleet } from '../store/made-up-fleet';
import { until } from '../until';
import { browsedSite } from './browsed-site';
import { signedInPage } from './signed-in-page';

const LINES = 30;
const TEST_MS = 90_000;

const browsed = browsedSite((store) => storedFleet(store, LINES), { webOnly: true });

const LINE_PAGE = /\/lines\/[a-z0-9-]+$/;
const PATIENCE_MS = 20_000;

describe('the scatter of the fleet', () => {
  it('opens a line by a click on its point', { timeout: TEST_MS }, async () => {
    const page = await signedInPage(browsed, { role: 'engineer', path: '/margins' });
    const chart = page.getByRole('img', { name: /^Charging share against mismatch share/ });
    await chart.scrollIntoViewIfNeeded();
    await chart.locator('svg path[fill]:not([fill=none])').first().waitFor();
    const marks = chart.locator('svg path[fill]:not([fill=none])');
    const points = await marks.evaluateAll((drawn) =>
      drawn.flatMap((mark, at) => {
        const { width, height } = mark.getBoundingClientRect();
        return Math.min(width, height) > 4 && Math.max(width, height) < 16 ? [at] : [];
      }),
    );
    expect(points.length).toBeGreaterThan(LINES / 2);
    // the chart itself listens, not its marks, and only once it has drawn itself for the last time
    await until(
      async () => {
        await marks.nth(points[0]!).click({ force: true });
        return page.waitForURL(LINE_PAGE, { timeout: 2_000 }).then(
          () => true,
          () => false,
        );
      },
      PATIENCE_MS,
      'a line that its point opens',
    );
  });

  it('opens a line by keyboard, from the table behind it', { timeout: TEST_MS }, async () => {
    const page = await signedInPage(browsed, { role: 'engineer', path: '/margins' });
    const panel = page.locator('section.panel', {
      has: page.getByRole('heading', { name: 'Charging against mismatch' }),
    });
    await panel.getByRole('img', { name: /^Charging share/ }).waitFor();
    await panel.getByRole('button', { name: 'Table' }).focus();
    await page.keyboard.press('Enter');
    const first = panel.getByRole('region').getByRole('link').first();
    await first.waitFor();
    // Save as CSV, the table that scrolls, the first line
    for (let step = 0; step < 3; step += 1) await page.keyboard.press('Tab');
    expect(await first.evaluate((link) => link === document.activeElement)).toBe(true);
    const leadsTo = await first.getAttribute('href');
    await page.keyboard.press('Enter');
    await page.waitForURL(`**${leadsTo}`);
  });
});

describe('Forecast', () => {
  it('groups by what is chosen, and keeps that over a reload', { timeout: TEST_MS }, async () => {
    const page = await signedInPage(browsed, { role: 'planner', path: '/forecast' });
    await page.locator('astro-island:not([ssr]) form[role=search]').first().waitFor();
    await page.getByRole('combobox', { name: 'Group by' }).selectOption('likely cause');
    await page.waitForURL(/group=cause/);
    const groups = () => page.locator('section h3:not(li h3)').allInnerTexts();
    const grouped = await groups();
    expect(grouped).toEqual(expect.arrayContaining(['ratio mismatch']));
    await page.reload();
    expect(await groups()).toEqual(grouped);
  });

  it(
    'opens a follow-up for a line and ends it without a work, by keyboard',
    { timeout: TEST_MS },
    async () => {
      const page = await signedInPage(browsed, { role: 'planner', path: '/forecast' });
      await page.locator('astro-island:not([ssr]) form[role=search]').first().waitFor();
      await page
        .getByRole('button', { name: /^Open a follow-up for/ })
        .first()
        .focus();
      await page.keyboard.press('Enter');
      await page.keyboard.type('Measure the burden.');
      await page.getByRole('button', { name: 'Open the follow-up' }).focus();
      await page.keyboard.press('Enter');
      const done = page.getByRole('button', { name: /^Done: Measure the burden/ }).first();
      await done.waitFor();
      await page.reload();
      await page.locator('astro-island:not([ssr]) form[role=search]').first().waitFor();
      await page.getByRole('heading', { name: 'Open follow-ups, 1' }).waitFor();
      await done.focus();
      await page.keyboard.press('Enter');
      await page.getByRole('button', { name: 'End the follow-up' }).focus();
      await page.keyboard.press('Enter');
      await page.getByRole('heading', { name: 'No open follow-ups' }).waitFor();
    },
  );
});
