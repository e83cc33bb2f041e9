import type { Page } from 'playwright-core';
import type { Role } from '../../src/contract/role';
import { emailOf, PASSWORD } from '../running-site';
import type { BrowsedSite } from './browsed-site';

const PATIENCE_MS = 20_000;

/** A page of the site in a browser of its own, signed in through the form as a person does. */
export async function signedInPage(
  { browser, site }: BrowsedSite,
  { role, path }: { role: Role; path: string },
): Promise<Page> {
  const context = await browser().newContext({ viewport: { width: 1440, height: 900 } });
  const page = await context.newPage();
  page.setDefaultTimeout(PATIENCE_MS);
  await page.goto(`${site().address}${path}`);
  await page.getByLabel(/e-mail/i).fill(emailOf(role));
  await page.getByLabel(/password/i).fill(PASSWORD);
  await page.getByRole('button', { name: /sign in/i }).click();
  await page.getByRole('heading', { level: 1 }).waitFor();
  return page;
}

/** Controls of a page that no Tab reaches, and those that show no sign of it when they are reached. */
export async function walkedByKeyboard(
  page: Page,
): Promise<{ count: number; missed: string[]; unmarked: string[] }> {
  const controls = await page.evaluate(() => {
    const all = document.querySelectorAll<HTMLElement>('a[href], button, input, select, textarea, summary');
    const shown = [...all].filter((one) => one.checkVisibility() && !one.hasAttribute('disabled'));
    // of radio buttons of one name the arrows do the rest
    const ownStop = shown.filter(
      (one) => !(one instanceof HTMLInputElement && one.type === 'radio' && !one.checked),
    );
    ownStop.forEach((one, at) => (one.dataset.walked = `${at}`));
    return ownStop.map((one) => `${one.tagName.toLowerCase()} ${one.textContent?.trim().slice(0, 40) ?? ''}`);
  });
  const reached = new Set<number>();
  const unmarked: string[] = [];
  await page.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
  for (let step = 0; step < 3 * controls.length && reached.size < controls.length; step++) {
    await page.keyboard.press('Tab');
    const found = await page.evaluate(() => {
      const one = document.activeElement as HTMLElement | null;
      if (one?.dataset.walked === undefined) return undefined;
      const { outlineStyle, outlineWidth, boxShadow } = getComputedStyle(one);
      const isMarked = (outlineStyle !== 'none' && parseFloat(outlineWidth) > 0) || boxShadow !== 'none';
      return { at: Number(one.dataset.walked), isMarked };
    });
    if (found === undefined || reached.has(found.at)) continue;
    reached.add(found.at);
    if (!found.isMarked) unmarked.push(controls[found.at]!);
  }
  return { count: controls.length, missed: controls.filter((_, at) => !reached.has(at)), unmarked };
}
