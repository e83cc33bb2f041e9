import { type Browser, chromium } from 'playwright-core';

const PROGRAM = '/usr/bin/chromium';

/** Debian's browser, headless, asking nothing of the network but what a page asks. */
export const startChromium = (): Promise<Browser> =>
  chromium.launch({
    executablePath: PROGRAM,
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
