import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { madeUpLineOf, storedFleet } from '../store/made-up-fleet';
import { browsedSite } from './browsed-site';
import { signedInPage, walkedByKeyboard } from './signed-in-page';

const LINES = 30;
const WALK_MS = 120_000;

const browsed = browsedSite((store) => storedFleet(store, LINES));

describe('Margins', () => {
  it(
    'sorts, filters and chooses columns in its address, and saves what it shows',
    { timeout: 90_000 },
    async () => {
      const page = await signedInPage(browsed, { role: 'engineer', path: '/margins' });
      await page.locator('astro-island:not([ssr]) form[role=search]').first().waitFor();
      await page.getByRole('columnheader', { name: 'measured' }).getByRole('link').click();
      await page.waitForURL(/sort=levelAmps/);
      await page.getByRole('searchbox', { name: 'Name or place' }).fill('garth');
      await page.waitForURL(/text=garth/);
      await page.getByText('Columns', { exact: true }).click();
      await page.getByRole('checkbox', { name: 'expected level' }).uncheck();
      await page.waitForURL(/columns=/);

      const levels = async () =>
        (await page.locator('tbody tr').allInnerTexts()).map((row) =>
          Number(/(\d+(?:\.\d+)?)\u00a0A/.exec(row)?.[1]),
        );
      await page.reload();
      await page.locator('astro-island:not([ssr]) form[role=search]').first().waitFor();
      const shown = await levels();
      expect(shown.length).toBeGreaterThan(3);
      expect(shown).toEqual(shown.toSorted((one, other) => other - one));
      expect(await page.getByRole('columnheader', { name: 'expected' }).count()).toBe(0);

      const [saved] = await Promise.all([
        page.waitForEvent('download'),
        page.getByRole('link', { name: 'Save as CSV' }).first().click(),
      ]);
      const [head, ...rows] = (await readFile(await saved.path(), 'utf8')).trimEnd().split('\r\n');
      expect(head).toContain('standing level (A)');
      expect(head).not.toContain('expected level');
      expect(rows).toHaveLength(shown.length);
      expect(rows.every((row) => /garth/i.test(row))).toBe(true);
    },
  );
});

describe('Compare', () => {
  it(
    'says in words that a side has too few days, and gives no number of amperes',
    { timeout: 60_000 },
    async () => {
      const { key } = madeUpLineOf(1);
      const page = await signedInPage(browsed, { role: 'planner', path: `/lines/${key}/compare` });
      await page.getByLabel('Date of the work or the change').fill('2026-02-01');
      await page.getByRole('button', { name: 'Compare', exact: true }).click();
      await page.getByText(/For phase A there are 0 days .* too few to tell/).waitFor();
      await page.goto(`${browsed.site().address}/lines/${key}/compare?at=2026-02-30`);
      await page.getByText('The calendar has no day “2026-02-30”.').waitFor();
    },
  );
});

describe('by keyboard alone', () => {
  it.each([
    ['/margins', 'engineer'],
    ['/forecast', 'planner'],
    [`/lines/${madeUpLineOf(1).key}/compare?at=2026-02-01`, 'planner'],
    [`/lines/${madeUpLineOf(1).key}`, 'engineer'],
  ] as const)(
    'every control of %s is reached, and shows that it is',
    async (path, role) => {
      const page = await signedInPage(browsed, { role, path });
      await page.locator('astro-island:not([ssr])').first().waitFor();
      const { count, ...found } = await walkedByKeyboard(page);
      console.log(`${path}: ${count} controls`);
      expect(count).toBeGreaterThan(10);
      expect(found).toEqual({ missed: [], unmarked: [] });
    },
    WALK_MS,
  );
});
