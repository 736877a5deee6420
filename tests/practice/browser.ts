import { existsSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { delimiter, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium } from 'playwright-core';
import type { BrowserContext, Page } from 'playwright-core';
import type { TestContext } from 'vitest';

const names = ['chromium', 'chromium-browser', 'google-chrome-stable', 'google-chrome'];
const folders = ['/usr/bin', '/usr/local/bin', '/snap/bin'];
const elsewhere = [
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
];

/** Where this machine has a Chromium, on its path or where it usually lies; `null` where there is none. */
function findChromium(): string | null {
  const searched = [...(process.env['PATH'] ?? '').split(delimiter), ...folders];
  const places = [...names.flatMap((name) => searched.map((folder) => join(folder, name))), ...elsewhere];
  return places.find((place) => existsSync(place)) ?? null;
}

const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export interface Browsing {
  /** A new page, with everything that its console and its errors say. */
  open(address: string): Promise<{ readonly page: Page; readonly complaints: readonly string[] }>;
  close(): Promise<void>;
}

/** Without a browser a test is left out, with the reason; where everything has to run, it fails. */
export function withoutBrowser(context: TestContext): never {
  const reason = 'no Chromium on this machine';
  if (process.env['CI'] === undefined) context.skip(reason);
  throw new Error(reason);
}

/** Starts a browser without a window, with an empty profile that goes when it closes; `null` where there is none. */
export async function startBrowser(): Promise<Browsing | null> {
  const executablePath = findChromium();
  if (executablePath === null) return null;
  const profile = await mkdtemp(join(tmpdir(), 'divisor-browser-'));
  const context: BrowserContext = await chromium.launchPersistentContext(profile, {
    executablePath,
    headless: true,
    viewport: { width: 1180, height: 900 },
    reducedMotion: 'reduce',
    args: flags,
  });
  context.setDefaultTimeout(10_000);
  await context.addInitScript({ path: fileURLToPath(new URL('./in-page.js', import.meta.url)) });
  return {
    async open(address) {
      const page = await context.newPage();
      const complaints: string[] = [];
      page.on('console', (message) => {
        if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
      });
      page.on('pageerror', (error) => complaints.push(error.message));
      await page.goto(address);
      await page.locator('#tries button').first().waitFor();
      return { page, complaints };
    },
    async close() {
      await context.close();
      await rm(profile, { recursive: true, force: true, maxRetries: 5 });
    },
  };
}
