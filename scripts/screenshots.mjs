// npm run screenshots: pictures of the running demo for the README, into docs/screens. Start it first, with npm start.
import { mkdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { ensureChromium } from './steps/chromium.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { onStop, program } from './steps/program.mjs';
import { Refusal, say } from './steps/say.mjs';
import { readPorts, requireNode, root } from './steps/settings.mjs';

const phone = { width: 390, height: 844 };
const wide = { width: 1440, height: 900 };
const folder = path.join(root, 'docs/screens');

/** `find` asks the API for what the demo's ids are today. */
const pictures = [
  { name: 'shop-phone', window: phone, path: '/' },
  { name: 'shop-wide', window: wide, path: '/' },
  { name: 'box-phone', window: phone, find: async (ask) => `/boxes/${(await ask('/api/shop')).boxes[0].slug}` },
  {
    name: 'box-dark-phone',
    window: phone,
    scheme: 'dark',
    find: async (ask) => `/boxes/${(await ask('/api/shop')).boxes[1].slug}`,
  },
  { name: 'trade-wide', window: wide, role: 'butcher', path: '/trade' },
  { name: 'today-wide', window: wide, role: 'owner', path: '/office/today' },
  {
    name: 'carcase-wide',
    window: wide,
    role: 'owner',
    find: async (ask) => `/office/carcases/${(await nextDay(ask)).carcases[0].id}`,
  },
  {
    name: 'allocation-wide',
    window: wide,
    role: 'owner',
    find: async (ask) => `${pathOf(await nextDay(ask))}/allocation`,
  },
  {
    name: 'collections-wide',
    window: wide,
    role: 'owner',
    find: async (ask) => `${pathOf(await pastDay(ask))}/collections`,
  },
  {
    name: 'run-sheet-phone',
    window: phone,
    role: 'owner',
    find: async (ask) => `${pathOf(await pastDay(ask))}/run-sheet`,
  },
];

async function listDays(ask) {
  const { days } = await ask('/api/cutting-days');
  return days.sort((a, b) => a.day.localeCompare(b.day));
}

/** The next cutting day, which is on sale. */
async function nextDay(ask) {
  const today = new Date().toISOString().slice(0, 10);
  const day = (await listDays(ask)).find((each) => each.day >= today);
  if (!day) throw new Refusal('No cutting day is ahead: npm run reset makes the demo farm afresh.');
  return ask(`/api/cutting-days/${day.id}`);
}

/** The first cutting day of the demo, which is over. */
const pastDay = async (ask) => (await listDays(ask))[0];

const pathOf = (day) => `/office/cutting-days/${day.id}`;

function accountOf(role) {
  const people = JSON.parse(readFileSync(path.join(root, 'db/seed/demo-sign-ins.json'), 'utf8'));
  return people.find((person) => person.role === role);
}

async function signIn(context, origin, role) {
  const { email, password } = accountOf(role);
  const answer = await context.request.post(`${origin}/api/auth/sign-in/email`, {
    headers: { origin },
    data: { email, password },
  });
  if (!answer.ok())
    throw new Refusal(`The demo's ${role} could not sign in (${answer.status()}): npm run reset may help.`);
}

async function take(browser, origin, picture) {
  const context = await browser.newContext({
    baseURL: origin,
    viewport: picture.window,
    colorScheme: picture.scheme ?? 'light',
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'Europe/London',
  });
  if (picture.role) await signIn(context, origin, picture.role);
  const ask = async (address) => (await context.request.get(`${origin}${address}`)).json();
  const page = await context.newPage();
  const trouble = [];
  page.on('pageerror', (error) => trouble.push(error.message));
  page.on('console', (message) => message.type() === 'error' && trouble.push(message.text()));
  const address = picture.path ?? (await picture.find(ask));
  await page.goto(address, { waitUntil: 'networkidle' });
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await page.screenshot({ path: path.join(folder, `${picture.name}.png`) });
  await context.close();
  say(`- ${picture.name}.png, ${address}`);
  return trouble.map((line) => `${address}: ${line}`);
}

async function screenshots() {
  requireNode();
  await ensureDependencies();
  await ensureChromium();
  const origin = `http://localhost:${readPorts().PORT}`;
  const isRunning = await fetch(`${origin}/api/health`).then(
    (answer) => answer.ok,
    () => false,
  );
  if (!isRunning) throw new Refusal(`Nothing answers at ${origin}: start the demo first, with npm start.`);
  mkdirSync(folder, { recursive: true });
  const { chromium } = await import('playwright-core');
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking'],
  });
  onStop(() => browser.close());
  const wanted = process.argv.slice(2);
  const trouble = [];
  for (const picture of pictures) {
    if (wanted.length > 0 && !wanted.includes(picture.name)) continue;
    trouble.push(...(await take(browser, origin, picture)));
  }
  if (trouble.length > 0) throw new Refusal(`The pictures are made, but pages complained:\n${trouble.join('\n')}`);
}

await program(screenshots);
