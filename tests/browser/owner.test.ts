import type { Page } from 'playwright-core';
import { expect, it } from 'vitest';
import { madeUpLineOf, ownerAt, storedFleet } from '../store/made-up-fleet';
import { browsedSite } from './browsed-site';
import { signedInPage } from './signed-in-page';

const LINES = 30;
/** a line of 110 kV, whose owner is not recorded */
const UNOWNED = madeUpLineOf(0);
const TRANSMISSION = ownerAt(380)!;

const browsed = browsedSite((store) => storedFleet(store, LINES));

const engineerAt = (path: string): Promise<Page> => signedInPage(browsed, { role: 'engineer', path });

/** An island that has come to life answers to its choices; before that a choice is lost. */
const alive = (page: Page) =>
  page.locator('astro-island:not([ssr])').filter({ has: page.locator('form[role=search]') });

const ownerOf = (page: Page) => page.getByRole('combobox', { name: 'Owner', exact: true });

it('an owner is recorded by the form, found in the list, and taken away', { timeout: 90_000 }, async () => {
  const page = await engineerAt(`/register/${UNOWNED.key}`);
  const field = page.getByLabel('Owner (may stay empty)');
  expect(
    await page.locator('datalist option').evaluateAll((all) => all.map((one) => one.getAttribute('value'))),
  ).toEqual([TRANSMISSION, ownerAt(220)]);
  await field.fill(' Pellwater Networks ');
  await page.getByRole('button', { name: 'Save the facts' }).click();
  await page.getByText('The facts are saved.').waitFor();
  await page.getByText(/two terminals · of Pellwater Networks$/).waitFor();

  await page.goto(`${browsed.site().address}/register?q=pellwater`);
  expect(await page.getByRole('row').count()).toBe(2);
  await page
    .getByRole('row', { name: /Pellwater Networks/ })
    .getByRole('link', { name: UNOWNED.name })
    .click();
  await field.fill('');
  await page.getByRole('button', { name: 'Save the facts' }).click();
  await page.getByText('The facts are saved.').waitFor();
  expect(await field.inputValue()).toBe('');
  await page.goto(`${browsed.site().address}/register?q=pellwater`);
  await page.getByText('No line of the register matches.').waitFor();
});

it('Forecast is grouped and narrowed by owner, as its address says', { timeout: 90_000 }, async () => {
  const page = await engineerAt('/forecast');
  await alive(page).waitFor();
  await page.getByRole('combobox', { name: 'Group by', exact: true }).selectOption('owner');
  await page.waitForURL(`${browsed.site().address}/forecast?group=owner`);
  const headings = async () => new Set(await page.getByRole('heading', { level: 3 }).allTextContents());
  await page.getByRole('heading', { name: 'owner not recorded' }).first().waitFor();
  for (const name of [TRANSMISSION, ownerAt(220)!]) expect(await headings()).toContain(name);

  await ownerOf(page).selectOption(TRANSMISSION);
  await page.waitForURL((address) => address.searchParams.get('owner') === TRANSMISSION);
  await page.reload();
  await alive(page).waitFor();
  expect(await ownerOf(page).inputValue()).toBe(TRANSMISSION);
  expect(await headings()).toContain(TRANSMISSION);
  expect(await headings()).not.toContain('owner not recorded');
  await page.goBack();
  await page.getByRole('heading', { name: 'owner not recorded' }).first().waitFor();
});

it('Margins are narrowed to one owner, and so is the file that is saved', { timeout: 90_000 }, async () => {
  const page = await engineerAt('/margins');
  await alive(page).waitFor();
  await ownerOf(page).selectOption(TRANSMISSION);
  await page.getByText(`${LINES} rows`, { exact: true }).waitFor();
  await page.getByText('Columns', { exact: true }).click();
  await page.getByRole('checkbox', { name: 'owner' }).check();
  await page.getByRole('columnheader', { name: 'owner' }).waitFor();
  expect(await page.getByRole('cell', { name: TRANSMISSION }).count()).toBe(LINES);

  await page.waitForURL((address) => address.searchParams.has('columns'));
  const search = new URL(page.url()).searchParams;
  expect(search.get('owner')).toBe(TRANSMISSION);
  expect(search.get('columns')).toMatch(/^owner,share,/);
  const file = await page.getByRole('link', { name: 'Save as CSV' }).getAttribute('href');
  const saved = await (await page.request.get(`${browsed.site().address}${file}`)).text();
  const rows = saved.trimEnd().split('\r\n').slice(1);
  expect(rows).toHaveLength(LINES);
  expect(rows.every((row) => row.includes(`,${TRANSMISSION},`))).toBe(true);
});
