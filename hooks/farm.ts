import { getShopHome, type ShopHome } from '#shared/contracts/shop.ts';
import { call } from './api.ts';

export type Farm = ShopHome['farm'];

const KEPT_MS = 60_000;
let kept: { farm: Farm; at: number } | undefined;

/** Name and address for the foot of every page. Asked for once a minute; null while the API does not answer. */
export async function loadFarm(): Promise<Farm | null> {
  if (kept && Date.now() - kept.at < KEPT_MS) return kept.farm;
  try {
    const { farm } = await call(getShopHome, {});
    kept = { farm, at: Date.now() };
    return farm;
  } catch {
    // The foot can do without; the page's own data says what is wrong.
    return kept?.farm ?? null;
  }
}
