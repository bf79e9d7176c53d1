// Every screen of the app, to be looked at on a phone and on a wide screen.
import { boxPath, nextDay, orderPath, pastDay, pathOf } from './demo.mjs';
import { PHONE, WIDE } from './take.mjs';

/** A basket with one box in it, as a visitor fills it. */
async function fillBasket(page, ask) {
  await page.goto(await boxPath(ask), { waitUntil: 'networkidle' });
  await page
    .getByRole('button', { name: /add to basket/i })
    .first()
    .click();
}

const customer = (name, find) => ({ name, role: 'customer', find });
const owner = (name, find) => ({ name, role: 'owner', find });
const ofNextDay = (part) => async (ask) => pathOf(await nextDay(ask)) + part;
const ofPastDay = (part) => async (ask) => pathOf(await pastDay(ask)) + part;
const first = (address, list, pathTo) => async (ask) => pathTo((await ask(address))[list][0]);

const shop = [
  { name: 'home', path: '/' },
  { name: 'box', find: (ask) => boxPath(ask) },
  { name: 'cuts', path: '/cuts' },
  { name: 'basket', prepare: fillBasket, path: '/basket' },
  { name: 'basket-empty', path: '/basket' },
  { name: 'checkout', prepare: fillBasket, path: '/checkout' },
  customer('order', (ask) => orderPath(ask)),
  customer('order-collected', (ask) => orderPath(ask, 'collected')),
  customer('order-add', async (ask) => `${await orderPath(ask)}/add`),
  customer('order-time', async (ask) => `${await orderPath(ask)}/time`),
  {
    name: 'trace',
    role: 'owner',
    find: async (ask) => {
      const day = await pastDay(ask);
      return `/trace/${(await ask(`/api/cutting-days/${day.id}/packing`)).packs[0].code}`;
    },
  },
  { name: 'sign-in', path: '/account/sign-in' },
  { name: 'sign-up', path: '/account/sign-up' },
  { name: 'reset', path: '/account/reset' },
  { name: 'account', role: 'customer', path: '/account' },
  { name: 'account-details', role: 'customer', path: '/account/details' },
  { name: 'account-close', role: 'customer', path: '/account/close' },
  { name: 'standing', role: 'customer', path: '/account/standing' },
  { name: 'standing-start', role: 'customer', path: '/account/standing/start' },
  { name: 'not-found', path: '/no-such-page', isMissing: true },
];

const trade = [
  { name: 'trade-carcases', role: 'butcher', path: '/trade/carcases' },
  {
    name: 'trade-reserve',
    role: 'butcher',
    find: first('/api/trade/days', 'days', (day) => `/trade/reserve/${day.id}`),
  },
  { name: 'trade-reservations', role: 'butcher', path: '/trade/reservations' },
  { name: 'trade-apply', role: 'customer', path: '/trade/apply' },
];

const office = [
  owner('today', () => '/office/today'),
  owner('herd', () => '/office/herd'),
  owner(
    'animal',
    first('/api/animals', 'animals', (animal) => `/office/herd/${animal.id}`),
  ),
  owner('animal-add', () => '/office/herd/add'),
  owner('cutting-days', () => '/office/cutting-days'),
  owner('cutting-day-new', () => '/office/cutting-days/new'),
  owner('cutting-day', ofNextDay('')),
  owner('carcase', async (ask) => `/office/carcases/${(await nextDay(ask)).carcases[0].id}`),
  owner('allocation', ofNextDay('/allocation')),
  owner('what-if', ofNextDay('/what-if')),
  owner('margin', ofNextDay('/margin')),
  owner('packing', ofPastDay('/packing')),
  owner('comparison', ofPastDay('/comparison')),
  owner('collections', ofPastDay('/collections')),
  owner('run-sheet', ofPastDay('/run-sheet')),
  owner('orders', () => '/office/orders'),
  owner('boxes', () => '/office/boxes'),
  owner(
    'box-kind',
    first('/api/office/box-kinds', 'boxKinds', (kind) => `/office/boxes/${kind.id}`),
  ),
  owner('trade', () => '/office/trade'),
  owner(
    'trade-account',
    first('/api/office/trade-accounts', 'accounts', (account) => `/office/trade/${account.id}`),
  ),
  owner('specifications', () => '/office/specifications'),
  owner(
    'specification',
    first('/api/specifications', 'specifications', (one) => `/office/specifications/${one.id}`),
  ),
  owner(
    'learning',
    first('/api/specifications', 'specifications', (one) => `/office/specifications/${one.id}/learning`),
  ),
  owner(
    'photographs',
    first('/api/office/box-kinds', 'boxKinds', (kind) => `/office/photographs/${kind.id}`),
  ),
  owner('customers', () => '/office/customers'),
  owner('delivery', () => '/office/delivery-areas'),
  owner('codes', () => '/office/promo-codes'),
  owner('price-grid', () => '/office/price-grid'),
  owner('mails', () => '/office/mails'),
  owner('settings', () => '/office/settings'),
];

const screens = [...shop, ...trade, ...office.map((screen) => ({ ...screen, name: `office-${screen.name}` }))];

export const everyScreen = screens.flatMap((screen) => [
  { ...screen, name: `${screen.name}-phone`, window: PHONE },
  { ...screen, name: `${screen.name}-wide`, window: WIDE },
]);
