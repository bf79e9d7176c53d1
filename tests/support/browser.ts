import { existsSync, mkdirSync } from 'node:fs';
import path from 'node:path';
import { AxeBuilder } from '@axe-core/playwright';
import { type Browser, chromium, type Page } from 'playwright-core';
import { expect, onTestFinished } from 'vitest';
import { startWorld, type World } from './harness.ts';
import { PASSWORD, type SignedIn } from './sign-in.ts';

const root = path.resolve(import.meta.dirname, '../..');
const screenshots = path.join(root, '.data/failed-screens');

export const PHONE = { width: 390, height: 844 };
export const WIDE = { width: 1440, height: 900 };

export type Window = { width: number; height: number; scheme?: 'light' | 'dark' };

export type BrowserWorld = {
  world: World;
  /** Opens an empty page. The test fails when the page complains, and a failed test leaves a picture of it. */
  openPage: (window: Window) => Promise<Page>;
  stop: () => Promise<void>;
};

/** Chromium of Debian's packages; playwright-core brings no browser of its own. */
export function launchChromium(): Promise<Browser> {
  return chromium.launch({
    executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
    headless: true,
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

/** The whole server with the exported web app, and a browser that looks at it. */
export async function startBrowserWorld(): Promise<BrowserWorld> {
  if (!existsSync(path.join(root, 'dist/server'))) {
    throw new Error('The web app is not built: run the tests with "npm test", or "npm run build" before.');
  }
  const [world, browser] = await Promise.all([startWorld({ withPages: true }), launchChromium()]);
  return {
    world,
    openPage: (window) => openPage(browser, window, world.origin),
    stop: async () => {
      await browser.close();
      await world.stop();
    },
  };
}

async function openPage(browser: Browser, { width, height, scheme }: Window, baseURL: string): Promise<Page> {
  const context = await browser.newContext({
    baseURL,
    viewport: { width, height },
    hasTouch: width < 600,
    colorScheme: scheme ?? 'light',
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'Europe/London',
  });
  context.setDefaultTimeout(60_000);
  const page = await context.newPage();
  const complaints = listenFor(page, baseURL);
  onTestFinished(async ({ task }) => {
    if (task.result?.state === 'fail' || complaints.length > 0) await keepPicture(page, task.name);
    await context.close();
    expect(complaints, 'what the page complained of').toEqual([]);
  });
  return page;
}

/** What our own pages complain of. The payment company's page answers a declined card with an error status, as it should. */
function listenFor(page: Page, origin: string): string[] {
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(`error: ${error.message}`));
  page.on('console', (message) => {
    const isOurs = message.location().url.startsWith(origin);
    if (message.type() === 'error' && isOurs) complaints.push(`console: ${message.text()} (${message.location().url})`);
  });
  return complaints;
}

async function keepPicture(page: Page, name: string): Promise<void> {
  mkdirSync(screenshots, { recursive: true });
  const file = path.join(screenshots, `${name.replaceAll(/[^a-z0-9]+/gi, '-').slice(0, 100)}.png`);
  await page.screenshot({ path: file, fullPage: true });
  console.log(`The page at ${page.url()} is pictured in ${file}`);
}

/** Signs the page in with a cookie, where signing in is not what the test is about. */
export async function enterAs(page: Page, origin: string, signedIn: SignedIn): Promise<void> {
  const cookies = signedIn.cookie.split('; ').map((pair) => {
    const at = pair.indexOf('=');
    return { name: pair.slice(0, at), value: pair.slice(at + 1), url: origin };
  });
  await page.context().addCookies(cookies);
}

/** Signs in as a person does, on the sign-in screen that `page` shows. */
export async function fillSignIn(page: Page, email: string): Promise<void> {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

/**
 * axe-core finds nothing serious or critical on the page as it stands. A frame in which no script may run is left out,
 * since axe would wait in it for ever: what it shows is checked on a page of its own.
 */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).exclude('iframe[sandbox]').analyze();
  const grave = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
  const found = grave.map(
    ({ id, impact, nodes }) =>
      `${id} (${impact}): ${nodes.map(({ html, failureSummary }) => `${html} ${failureSummary ?? ''}`).join('\n')}`,
  );
  expect(found, `axe-core on ${page.url()}`).toEqual([]);
}
