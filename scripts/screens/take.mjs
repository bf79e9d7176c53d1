import { readFileSync } from 'node:fs';
import path from 'node:path';
import { Refusal } from '../steps/say.mjs';
import { root } from '../steps/settings.mjs';

export const PHONE = { width: 390, height: 844 };
export const WIDE = { width: 1440, height: 900 };

function accountOf(role) {
  const people = JSON.parse(readFileSync(path.join(root, 'db/seed/demo-sign-ins.json'), 'utf8'));
  return people.find((person) => person.role === role);
}

const signedIn = new Map();

/** Signs in once for each role: the door counts attempts. */
async function cookiesOf(browser, origin, role) {
  if (!role) return undefined;
  if (!signedIn.has(role)) {
    const context = await browser.newContext();
    const { email, password } = accountOf(role);
    const answer = await context.request.post(`${origin}/api/auth/sign-in/email`, {
      headers: { origin },
      data: { email, password },
    });
    if (!answer.ok())
      throw new Refusal(`The demo's ${role} could not sign in (${answer.status()}): npm run reset may help.`);
    signedIn.set(role, await context.storageState());
    await context.close();
  }
  return signedIn.get(role);
}

/**
 * Looks at one page as `picture.role` sees it. `find` asks the API for what the demo's ids are today, `prepare` walks to
 * a state that no address has. Answers the address, and what the page complained about.
 */
export async function takePicture(browser, origin, { picture, file }) {
  const context = await browser.newContext({
    baseURL: origin,
    viewport: picture.window,
    colorScheme: picture.scheme ?? 'light',
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    storageState: await cookiesOf(browser, origin, picture.role),
  });
  const ask = async (address) => (await context.request.get(`${origin}${address}`)).json();
  const page = await context.newPage();
  const trouble = [];
  page.on('pageerror', (error) => trouble.push(error.message));
  page.on('console', (message) => {
    // A browser logs the status of a page that is rightly a 404.
    if (message.type() === 'error' && !picture.isMissing) trouble.push(message.text());
  });
  await picture.prepare?.(page, ask);
  const address = picture.path ?? (await picture.find(ask));
  await page.goto(address, { waitUntil: 'networkidle' });
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  const isJpeg = file.endsWith('.jpg');
  await page.screenshot({ path: file, ...(isJpeg ? { type: 'jpeg', quality: 60, fullPage: true } : {}) });
  await context.close();
  return { address, trouble: trouble.map((line) => `${address}: ${line}`) };
}
