import { recordMovements } from '#server/carcases/ledger-queries.ts';
import type { Tx } from '#server/deps.ts';
import { endAssignments, readFrozen, readPlaces } from '#server/packs/pack-queries.ts';
import { listPacksOfOrder } from './order-queries.ts';

/** Takes an order's packs out of it again; those that the ledger has in the order go back to the chiller, or the freezer. */
export async function returnPacks(tx: Tx, orderId: string, byUserId: string | null): Promise<void> {
  const packs = await listPacksOfOrder(tx, orderId);
  if (packs.length === 0) return;
  const ids = packs.map((pack) => pack.id);
  const places = await readPlaces(tx, ids);
  const frozen = await readFrozen(tx, ids);
  await endAssignments(tx, ids);
  await recordMovements(
    tx,
    packs
      .filter((pack) => places.get(pack.id)?.place === 'order')
      .map(({ id, carcaseId, grams }) => ({
        carcaseId,
        packId: id,
        fromPlace: 'order' as const,
        toPlace: frozen.has(id) ? ('freezer' as const) : ('chiller' as const),
        grams,
        reason: 'order cancelled',
        byUserId,
      })),
  );
}
