import { chromium } from 'playwright-core';
import type { Browser } from 'playwright-core';

/** Chromium from the distribution, quiet: it asks the network for nothing by itself. */
export function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
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
}
