import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { type BrowserWorld, expectAccessible, PHONE, startBrowserWorld } from '#tests/support/browser.ts';
import { makeStall } from '#tests/support/make-order.ts';

let shop: BrowserWorld;

beforeAll(async () => {
  shop = await startBrowserWorld();
  await makeStall(shop.world, { boxes: 17 });
});

afterAll(() => shop.stop());

async function rawPage(path: string): Promise<{ status: number; html: string }> {
  const answer = await fetch(`${shop.world.origin}${path}`);
  return { status: answer.status, html: await answer.text() };
}

/** The words of the page as a reader without scripts meets them. */
const wordsOf = (html: string) =>
  html
    .replace(/<(script|style)[\s\S]*?<\/\1>/g, '')
    .replace(/<!--.*?-->/g, '')
    .replace(/<[^>]+>/g, ' ')
    .replace(/\s+/g, ' ');

describe('the public pages, before any script runs', () => {
  test('the first page, while boxes are on sale, has its title, the price and the stock in the raw HTML', async () => {
    const { status, html } = await rawPage('/');
    expect(status).toBe(200);
    expect(/<title[^>]*>([^<]*)/.exec(html)?.[1]).toContain('Skelderwick');
    expect(html).toMatch(/<meta[^>]+property="og:title"/);
    expect(wordsOf(html)).toContain('£94.00');
    expect(wordsOf(html)).toMatch(/\b17\b/);
    expect(html, 'a part of the page failed on the server').not.toContain('<!--$!-->');
  });

  test('a box, on its own page, has its name, price and stock in the raw HTML', async () => {
    const { status, html } = await rawPage('/boxes/hearth');
    expect(status).toBe(200);
    expect(/<title[^>]*>([^<]*)/.exec(html)?.[1]).toContain('Hearth');
    expect(wordsOf(html)).toContain('£94.00');
    expect(wordsOf(html)).toMatch(/\b17\b/);
    expect(html).not.toContain('<!--$!-->');
  });

  test.each(['/boxes/no-such-box', '/no/such/page'])('%s, which is nowhere, is a true 404 with words', async (path) => {
    const { status, html } = await rawPage(path);
    expect(status).toBe(404);
    expect(html).toMatch(/<h1[^>]*>[^<]+<\/h1>/);
  });

  test('an address that cannot be decoded, or that names another host, is refused without a page', async () => {
    for (const path of ['/%E0%A4%A', '//elsewhere.example.com/x']) {
      const answer = await fetch(`${shop.world.origin}${path}`, { redirect: 'manual' });
      expect(answer.status).toBeGreaterThanOrEqual(400);
      expect(answer.status).toBeLessThan(500);
    }
  });
});

describe('the public pages, in a browser', () => {
  test.each(['/', '/boxes/hearth', '/cuts', '/basket'])(
    '%s, on a phone, wakes up without a complaint',
    async (path) => {
      const page = await shop.openPage(PHONE);
      await page.goto(path, { waitUntil: 'networkidle' });
      await page.getByRole('heading', { level: 1 }).first().waitFor();
      await expectAccessible(page);
      const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      expect(overflow, 'pixels that the page is wider than the phone').toBeLessThanOrEqual(0);
    },
  );

  // The router reads every layout when it starts, so the frames of office and trade come along; their screens must not.
  const FOREIGN = ['/api/carcases', '/api/animals', 'Cutting note', '/api/auth', 'ZodError', 'shouldUnregister'];

  test.each(['/', '/boxes/hearth', '/cuts'])(
    '%s, until something is typed, loads no code of forms or of other areas',
    async (path) => {
      const page = await shop.openPage(PHONE);
      const scripts: Promise<string>[] = [];
      page.on('response', (response) => {
        if (response.request().resourceType() !== 'script') return;
        // One that is still on its way when the page closes has not been loaded for it.
        scripts.push(response.text().catch(() => ''));
      });
      await page.goto(path, { waitUntil: 'networkidle' });
      const code = (await Promise.all(scripts)).join('');
      expect(code.length).toBeGreaterThan(0);
      expect(FOREIGN.filter((mark) => code.includes(mark))).toEqual([]);
    },
  );
});
