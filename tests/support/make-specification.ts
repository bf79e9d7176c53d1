import type { Db } from '#db/client.ts';
import { cut } from '#db/schema/products.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { makeSpecification } from './make-farm.ts';

/** The shipped way to cut a side, ready for a cutting day. */
export function makeTraditionalSide(db: Db) {
  return makeSpecification(db, { name: traditionalSide.name, body: traditionalSide });
}

/** Its cuts with their shipped prices. */
export async function makeTraditionalCuts(db: Db): Promise<void> {
  await db.insert(cut).values(
    traditionalSide.cuts.map((product) => ({
      id: product.id,
      name: product.name,
      description: product.description,
      cooking: product.cooking,
      tenthPencePerKg: product.tenthPencePerKg,
      clearanceTenthPencePerKg: product.clearanceTenthPencePerKg,
      minPackGrams: product.minPackGrams,
      maxPackGrams: product.maxPackGrams,
      looseDemandPacks: 10,
      isSoldLoose: product.isSoldLoose,
      isFarmMinced: product.kind === 'mince',
      useByDays: product.useByDays,
    })),
  );
}
