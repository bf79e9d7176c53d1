// Where the demo's things are today: `ask` fetches from its API as whoever looks.
import { Refusal } from '../steps/say.mjs';

async function listDays(ask) {
  const { days } = await ask('/api/cutting-days');
  return days.sort((a, b) => a.day.localeCompare(b.day));
}

/** The next cutting day, which is on sale. */
export async function nextDay(ask) {
  const today = new Date().toISOString().slice(0, 10);
  const day = (await listDays(ask)).find((each) => each.day >= today);
  if (!day) throw new Refusal('No cutting day is ahead: npm run reset makes the demo farm afresh.');
  return ask(`/api/cutting-days/${day.id}`);
}

/** The first cutting day of the demo, which is over. */
export const pastDay = async (ask) => (await listDays(ask))[0];

export const pathOf = (day) => `/office/cutting-days/${day.id}`;

export const boxPath = async (ask, at = 0) => `/boxes/${(await ask('/api/shop')).boxes[at].slug}`;

/** An order of the demo's customer: one that can still be changed, or one that has been collected. */
export async function orderPath(ask, state = 'confirmed') {
  const { orders } = await ask('/api/my/orders');
  const order = orders.find((each) => each.state === state);
  if (!order) throw new Refusal(`The demo's customer has no ${state} order: npm run reset makes the demo farm afresh.`);
  return `/orders/${order.token}`;
}
