import type { Tx } from '#db/client.ts';
import { boxKind, boxLine, boxLineCut, cut } from '#db/schema/products.ts';
import { cuttingSpecification } from '#db/schema/carcases.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { LOOSE_CUTS, STARTING_BOXES } from './box-kinds.ts';

/** What every farm starts with: one way to cut a side, its cuts with prices to set, and the five boxes. */
export async function insertStartingProducts(tx: Tx, { isActive = true } = {}): Promise<{ specificationId: string }> {
  const [specification] = await tx
    .insert(cuttingSpecification)
    .values({ name: traditionalSide.name, edition: 1, body: traditionalSide })
    .returning({ id: cuttingSpecification.id });
  if (!specification) throw new Error('The cutting specification was not kept.');
  await tx.insert(cut).values(
    traditionalSide.cuts.map((product) => ({
      id: product.id,
      name: product.name,
      description: product.description,
      cooking: product.cooking,
      tenthPencePerKg: product.tenthPencePerKg,
      clearanceTenthPencePerKg: product.clearanceTenthPencePerKg,
      minPackGrams: product.minPackGrams,
      maxPackGrams: product.maxPackGrams,
      looseDemandPacks: LOOSE_CUTS[product.id] ?? 0,
      isSoldLoose: product.id in LOOSE_CUTS,
      isFarmMinced: product.kind === 'mince',
      useByDays: product.useByDays,
    })),
  );
  const ids = new Map<string, string>();
  for (const [position, { lines, variantOf, ...kind }] of STARTING_BOXES.entries()) {
    const variantOfId = ids.get(variantOf ?? '') ?? null;
    const [row] = await tx
      .insert(boxKind)
      .values({ ...kind, isActive, variantOfId, position: position + 1 })
      .returning({ id: boxKind.id });
    if (!row) continue;
    ids.set(kind.slug, row.id);
    await insertLines(tx, row.id, lines);
  }
  return { specificationId: specification.id };
}

async function insertLines(tx: Tx, boxKindId: string, lines: (typeof STARTING_BOXES)[number]['lines']): Promise<void> {
  for (const [position, { name, limits, cutIds }] of lines.entries()) {
    const [minGrams, maxGrams, minPacks, maxPacks] = limits;
    const [line] = await tx
      .insert(boxLine)
      .values({ boxKindId, position, name, minGrams, maxGrams, minPacks, maxPacks })
      .returning({ id: boxLine.id });
    if (line) await tx.insert(boxLineCut).values(cutIds.map((cutId) => ({ boxLineId: line.id, cutId })));
  }
}
