import type { Page } from 'playwright-core';
import { expect, it } from 'vitest';
import {
  connectTerminals,
  insertMadeUpLine,
  instantsBefore,
  publishInstants,
} from '../faults/site-under-test';
import { nameOf } from '../running-site';
import { browsedSite } from './browsed-site';
import { signedInPage } from './signed-in-page';

const FOLLOWS_WITHIN_MS = 1_000;

const browsed = browsedSite(insertMadeUpLine);

const boardOf = (role: 'operator' | 'engineer'): Promise<Page> => signedInPage(browsed, { role, path: '/' });

it(
  'an operator sees a line turn near, acknowledges it, and a second browser follows',
  { timeout: 180_000 },
  async () => {
    const terminals = await connectTerminals(browsed.broker().url);
    const operator = await boardOf('operator');
    const engineer = await boardOf('engineer');
    const settled = instantsBefore(Date.now() - 90_000, 10);
    await publishInstants(terminals, settled, { differentialAmps: 20 });
    // 400 A in and 310 A out: 90 A stand against the threshold of 106.5 A, 85 %, for longer than the minute it takes
    const feeding = setInterval(
      () => void publishInstants(terminals, instantsBefore(Date.now(), 40), { differentialAmps: 90 }),
      2_000,
    );
    try {
      await operator.getByText('Phase A at 85 % of its threshold').first().waitFor();
      await operator
        .getByRole('button', { name: /acknowledge/i })
        .first()
        .click();
      await operator.getByRole('textbox', { name: /note/i }).fill('Called the line crew.');
      const followed = engineer
        .getByText(new RegExp(`acknowledged by ${nameOf('operator')}`, 'i'))
        .first()
        .waitFor();
      const begunMs = performance.now();
      await operator.getByRole('button', { name: /with this note/i }).click();
      await followed;
      expect(performance.now() - begunMs).toBeLessThan(FOLLOWS_WITHIN_MS);
      await engineer.getByText('Called the line crew.').first().waitFor();
    } finally {
      clearInterval(feeding);
      await terminals.close();
    }
  },
);
