import { apportion } from '#shared/engine/apportion.ts';
import { shareJointCost } from './joint-cost.ts';
import { totalCosts } from './margin.ts';
import type { DirectCosts, MarginEntry } from './margin-types.ts';

/** A sale, before what its carcase carries as a whole is shared out. */
export type Sale = Pick<MarginEntry, 'carcaseId' | 'channel' | 'boxKindId' | 'cutId' | 'incomePence' | 'costs'> & {
  /** Grams of product that left with it. */
  grams: number;
};

/** What one carcase costs and is worth as a whole, in pence, and its cold weight. */
export type CarcaseAccount = {
  carcaseId: string;
  coldGrams: number;
  deadweightPence: number;
  /** Kill, inspection, levy, haulage and butchery: what is spent before it is many products. */
  costs: Partial<DirectCosts>;
};

type Named = { id: string; sale: Sale };

function shareByGrams(total: number, named: readonly Named[]): Map<string, number> {
  const hasWeight = named.some(({ sale }) => sale.grams > 0);
  return apportion(
    total,
    named.map(({ id, sale }) => ({ id, weight: hasWeight ? sale.grams : 1 })),
  );
}

function entriesOf(dayId: string, account: CarcaseAccount, named: readonly Named[]): MarginEntry[] {
  const products = named.map(({ id, sale }) => ({
    id,
    salesPence: sale.incomePence,
    furtherCostPence: totalCosts(sale.costs),
  }));
  const shareOf = (pence: number) =>
    new Map(shareJointCost(pence, products).map(({ id, sharePence }) => [id, sharePence]));
  const deadweight = shareOf(account.deadweightPence);
  const cold = shareByGrams(account.coldGrams, named);
  const costs = Object.entries(account.costs).map(([name, pence]) => ({ name, shares: shareOf(pence) }));
  return named.map(({ id, sale: { grams: _grams, ...sale } }) => ({
    ...sale,
    dayId,
    costs: costs.reduce<Record<string, number>>(
      (all, { name, shares }) => ({ ...all, [name]: (all[name] ?? 0) + (shares.get(id) ?? 0) }),
      { ...sale.costs },
    ),
    deadweightPence: deadweight.get(id) ?? 0,
    coldGrams: cold.get(id) ?? 0,
  }));
}

/**
 * The ledger of a cutting day: each carcase's own costs and its deadweight value are shared among what it sold as, by net
 * realisable value, and its cold weight by the grams of product, so that a list by any dimension adds up to the day, to
 * the penny and the gram. A carcase that has sold nothing stands in the ledger alone; sales of no carcase of the day, such
 * as frozen stock, carry none of it.
 */
export function shareCarcases(
  dayId: string,
  sales: readonly Sale[],
  accounts: readonly CarcaseAccount[],
): MarginEntry[] {
  const named = sales.map((sale, at): Named => ({ id: String(at).padStart(6, '0'), sale }));
  const known = new Set(accounts.map(({ carcaseId }) => carcaseId));
  const others = named
    .filter(({ sale }) => sale.carcaseId === null || !known.has(sale.carcaseId))
    .map(({ sale: { grams: _grams, ...sale } }) => ({ ...sale, dayId, deadweightPence: 0, coldGrams: 0 }));
  const own = accounts.flatMap((account) => {
    const ofCarcase = named.filter(({ sale }) => sale.carcaseId === account.carcaseId);
    if (ofCarcase.length > 0) return entriesOf(dayId, account, ofCarcase);
    const { carcaseId, coldGrams, deadweightPence, costs } = account;
    const nothing = { channel: null, boxKindId: null, cutId: null, incomePence: 0 };
    return [{ carcaseId, dayId, ...nothing, costs, deadweightPence, coldGrams }];
  });
  return [...own, ...others];
}
