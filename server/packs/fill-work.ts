import type { Fill } from '#shared/contracts/packs.ts';
import { paidForCopy } from '#shared/domain/money.ts';
import type { Recipe } from '#shared/engine/allocation/allocation-input.ts';
import { checkBox } from '#shared/engine/box-fill/check-box.ts';
import type { PlacedPack } from '#shared/engine/box-fill/box-fill-types.ts';
import type { AssignmentRow, OrderWork, PackRow, TradeWork } from './pack-queries.ts';

/** One box, one loose pack or one trade line that packs must fill, with what lies in it. */
export type Job = {
  /** `<line id>/<copy>`. */
  id: string;
  lineId: string;
  copy: number;
  orderId: string | null;
  orderNo: number;
  orderName: string;
  item: string;
  /** Nothing is put in or taken out by a fill any more; a lost or re-weighed pack may open it again. */
  isPacked: boolean;
  /** Handed over or called to be collected: nothing may change. */
  isDone: boolean;
  packs: (PackRow & { boxLine: string })[];
} & (
  | { kind: 'box'; recipe: Recipe; pricePence: number }
  | { kind: 'loose'; cutId: string; upperGrams: number; pricePence: number }
  | { kind: 'trade'; cutId: string; grams: number }
);

export type WorkRows = {
  orders: readonly OrderWork[];
  trade: readonly TradeWork[];
  packs: readonly PackRow[];
  assignments: readonly AssignmentRow[];
  /** Recipes as they were when the day was put on sale. */
  recipes: ReadonlyMap<string, Recipe>;
};

export function listJobs(rows: WorkRows): Job[] {
  const orders = rows.orders.flatMap((work) =>
    Array.from({ length: work.quantity }, (_, index) => orderJob(rows, work, index + 1)),
  );
  const trade = rows.trade.map((work): Job => {
    const { lineId, orderNo, orderName, item, cutId, grams } = work;
    const packs = packsIn(rows, (each) => each.reservationLineId === lineId);
    const job = { id: `${lineId}/1`, lineId, copy: 1, orderId: null, orderNo, orderName, item, packs };
    return { ...job, isPacked: work.isDispatched, isDone: work.isDispatched, kind: 'trade', cutId, grams };
  });
  return [...trade, ...orders];
}

const HANDED_OVER = ['ready', 'collected', 'delivered', 'missed'];

function orderJob(rows: WorkRows, work: OrderWork, copy: number): Job {
  const { lineId, orderId, orderNo, orderName, item } = work;
  const packs = packsIn(rows, (each) => each.orderLineId === lineId && each.copy === copy);
  const isDone = HANDED_OVER.includes(work.state);
  const isPacked = isDone || work.state === 'packed';
  const job = { id: `${lineId}/${copy}`, lineId, copy, orderId, orderNo, orderName, item, packs, isDone, isPacked };
  const pricePence = paidForCopy(work, copy);
  const recipe = work.boxKindId ? rows.recipes.get(work.boxKindId) : undefined;
  if (recipe) return { ...job, kind: 'box', recipe, pricePence };
  return { ...job, kind: 'loose', cutId: work.cutId ?? '', upperGrams: work.unitGrams, pricePence };
}

function packsIn({ packs, assignments }: WorkRows, isHere: (row: AssignmentRow) => boolean): Job['packs'] {
  return assignments.filter(isHere).flatMap((assignment) => {
    const pack = packs.find((candidate) => candidate.id === assignment.packId);
    return pack ? [{ ...pack, boxLine: assignment.boxLine }] : [];
  });
}

export function placedPacks(job: Job): PlacedPack[] {
  return job.packs.map(({ id, cutId, grams, boxLine }) => ({ id, cutId, grams, state: 'fresh', lineId: boxLine }));
}

/** Butchers take whole packs and pay for what they weigh: within this share of what was reserved a line counts as met. */
const TRADE_TOLERANCE_PERCENT = 5;

/** How far a job is, by the same check that the plan's boxes had to pass. */
export function describeFill(job: Job): Fill {
  const { orderNo, orderName, item, copy } = job;
  const packs = job.packs.map(({ code, cut, grams }) => ({ code, cut, grams }));
  const grams = packs.reduce((sum, pack) => sum + pack.grams, 0);
  const kind = job.kind === 'trade' ? ('reservation' as const) : ('order' as const);
  const named = { kind, orderNo, orderName, item, copy, grams, packs, isPacked: job.isPacked };
  if (job.kind === 'box') {
    const check = checkBox(job.recipe, placedPacks(job));
    const missing = check.missing.map(({ name, shortGrams, shortPacks }) => ({ line: name, shortGrams, shortPacks }));
    return { ...named, isFilled: check.isFilled, guaranteedGrams: job.recipe.guaranteedGrams, missing };
  }
  if (job.kind === 'loose') {
    const missing = packs.length > 0 ? [] : [{ line: item, shortGrams: 0, shortPacks: 1 }];
    return { ...named, isFilled: packs.length > 0, guaranteedGrams: 0, missing };
  }
  const shortGrams = Math.max(0, job.grams - grams);
  const isFilled = shortGrams * 100 <= job.grams * TRADE_TOLERANCE_PERCENT;
  const missing = isFilled ? [] : [{ line: item, shortGrams, shortPacks: 0 }];
  return { ...named, isFilled, guaranteedGrams: job.grams, missing };
}
