import { gzipSync } from 'node:zlib';
import { ensureEmptyApp } from './empty-app.mjs';
import { runServer } from './servers.mjs';

const chromiumFlags = ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking'];

/** Every script that a browser fetches for the page until the network is quiet, as gzip would send it. */
async function measureScripts(browser, url) {
  const page = await browser.newPage();
  const sizes = [];
  page.on('response', (response) => {
    if (response.request().resourceType() !== 'script') return;
    sizes.push(response.body().then((body) => gzipSync(body, { level: 9 }).length));
  });
  await page.goto(url, { waitUntil: 'networkidle' });
  // Once it has started, the router asks for the layouts of the other areas.
  await page.waitForTimeout(3_000);
  await page.waitForLoadState('networkidle');
  const bytes = (await Promise.all(sizes)).reduce((sum, size) => sum + size, 0);
  await page.close();
  return { files: sizes.length, bytes };
}

/** JavaScript of the shop's first page against that of an app with one heading in it. `shop` is the running server's address. */
export async function measureFirstLoad(shop) {
  const empty = await runServer('empty-app', ['--import', 'tsx', 'scripts/bench/empty-server.ts'], {
    EMPTY_APP: await ensureEmptyApp(),
  });
  const { chromium } = await import('playwright-core');
  const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: chromiumFlags });
  try {
    const ours = await measureScripts(browser, shop);
    const floor = await measureScripts(browser, empty.url);
    return { ours, floor, ratio: ours.bytes / floor.bytes };
  } finally {
    await browser.close();
    await empty.stop();
  }
}
