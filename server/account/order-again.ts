import type { OrderAgain } from '#shared/contracts/account.ts';
import type { Deps } from '#server/deps.ts';
import { groupBy } from '#server/farm/group-by.ts';
import { getOrderByToken } from '#server/orders/read-order.ts';
import { listFreeProducts, listOrderedProducts } from './order-again-queries.ts';

type Wanted = { key: string; kind: 'box' | 'loose'; productId: string; name: string; quantity: number };
type FreeRow = Awaited<ReturnType<typeof listFreeProducts>>[number];

/** The same lines for the next day that has them all, or else for the one that has most of them. */
export async function readOrderAgain(deps: Deps, token: string): Promise<OrderAgain> {
  const order = await getOrderByToken(deps.db, token);
  const rows = await listOrderedProducts(deps.db, order.id);
  const wanted = new Map<string, Wanted>();
  const gone: string[] = [];
  for (const row of rows) {
    const product = productOf(row);
    if (!product) gone.push(row.name);
    else wanted.set(product.key, { ...product, quantity: (wanted.get(product.key)?.quantity ?? 0) + row.quantity });
  }
  const free = await listFreeProducts(deps.db, [...wanted.keys()], deps.clock.now());
  const day = bestDay([...wanted.values()], free);
  return { dayId: day?.dayId ?? null, day: day?.day ?? null, ...fill([...wanted.values()], day, gone) };
}

type OrderedRow = Awaited<ReturnType<typeof listOrderedProducts>>[number];

/** Null: the farm has taken it off the counter for good. */
function productOf({ box, cut }: OrderedRow): Omit<Wanted, 'quantity'> | null {
  if (box?.isActive) return { key: `box:${box.id}`, kind: 'box', productId: box.slug, name: box.name };
  if (cut?.isSoldLoose) return { key: `loose:${cut.id}`, kind: 'loose', productId: cut.id, name: cut.name };
  return null;
}

type Day = { dayId: string; day: string; left: Map<string, number> };

function bestDay(wanted: readonly Wanted[], rows: readonly FreeRow[]): Day | null {
  const days = [...groupBy(rows, (row) => row.dayId).values()].map((of) => ({
    dayId: of[0]?.dayId ?? '',
    day: of[0]?.day ?? '',
    left: new Map(of.map((row) => [row.productKey, row.free])),
  }));
  const score = (day: Day) => wanted.filter(({ key, quantity }) => (day.left.get(key) ?? 0) >= quantity).length;
  const some = (day: Day) => wanted.some(({ key }) => (day.left.get(key) ?? 0) > 0);
  // The days come with the next one first, and only a better one takes its place.
  return days.filter(some).reduce<Day | null>((best, day) => (best && score(best) >= score(day) ? best : day), null);
}

function fill(
  wanted: readonly Wanted[],
  day: Day | null,
  gone: string[],
): Pick<OrderAgain, 'items' | 'gone' | 'fewer'> {
  const answer: Pick<OrderAgain, 'items' | 'gone' | 'fewer'> = { items: [], gone: [...gone], fewer: [] };
  for (const { key, quantity, kind, productId, name } of wanted) {
    const left = day?.left.get(key) ?? 0;
    if (left <= 0) {
      answer.gone.push(name);
      continue;
    }
    if (left < quantity) answer.fewer.push({ name, asked: quantity, left });
    answer.items.push({ kind, productId, name, quantity: Math.min(left, quantity) });
  }
  return answer;
}
