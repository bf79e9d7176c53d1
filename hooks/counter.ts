import { getShopHome, listCuts, type ShopHome } from '#shared/contracts/shop.ts';
import { load, type Loaded } from './loaded.ts';
import { useCuts, useShopHome, type CutList } from './shop.ts';

/** All that is on the counter: the basket and the checkout find their offers in it. */
export type Counter = { home: Loaded<ShopHome>; cuts: Loaded<CutList> };

export async function loadCounter(): Promise<Counter> {
  const [home, cuts] = await Promise.all([load(getShopHome, {}), load(listCuts, {})]);
  return { home, cuts };
}

/** The two queries as one: ready when both are. */
export function useCounter(loaded: Counter) {
  const home = useShopHome(loaded.home);
  const cuts = useCuts(loaded.cuts);
  return {
    farm: home.data?.farm ?? null,
    data: home.data && cuts.data ? { home: home.data, cuts: cuts.data } : undefined,
    error: home.error ?? cuts.error,
    refetch: () => Promise.all([home.refetch(), cuts.refetch()]),
  };
}
