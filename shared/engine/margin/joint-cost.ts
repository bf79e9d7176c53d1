import { apportion } from '#shared/engine/apportion.ts';
import type { JointProduct, JointShare } from './margin-types.ts';

/**
 * Shares a joint cost (the deadweight value or the cost of rearing, with kill and butchery) among what comes of it, by
 * the net realisable value method of cost accounting: each product carries the cost in proportion to what it sells for
 * less what it still costs after split-off. A product that would lose money after split-off carries nothing. When none has
 * any value, the cost is shared by sales, and when nothing is sold, evenly. To the penny: the shares sum to the cost.
 * Ids must be unique. The shares are for reports; they never enter the allocation's objective.
 */
export function shareJointCost(jointPence: number, products: readonly JointProduct[]): JointShare[] {
  if (products.length === 0) return [];
  const shares = apportion(Math.abs(jointPence), weigh(products));
  return products.map(({ id, salesPence, furtherCostPence }) => {
    const netRealisablePence = salesPence - furtherCostPence;
    const sharePence = (shares.get(id) ?? 0) * (jointPence < 0 ? -1 : 1);
    return { id, netRealisablePence, sharePence, marginPence: netRealisablePence - sharePence };
  });
}

function weigh(products: readonly JointProduct[]): { id: string; weight: number }[] {
  const ways = [
    (product: JointProduct) => product.salesPence - product.furtherCostPence,
    (product: JointProduct) => product.salesPence,
    () => 1,
  ];
  const weights = ways.map((way) => products.map((one) => ({ id: one.id, weight: Math.max(0, way(one)) })));
  return weights.find((list) => list.some(({ weight }) => weight > 0)) ?? [];
}
