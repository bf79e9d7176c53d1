import { and, asc, eq, ne, or, sql } from 'drizzle-orm';
import { boxKind, boxLine, boxLineCut, cut } from '#db/schema/products.ts';
import type { BoxKindEdit, Cut } from '#shared/contracts/office.ts';
import type { Db, Tx } from '#server/deps.ts';

export function listOfficeCuts(db: Db | Tx): Promise<Cut[]> {
  return db
    .select({
      id: cut.id,
      name: cut.name,
      cooking: cut.cooking,
      tenthPencePerKg: cut.tenthPencePerKg,
      clearanceTenthPencePerKg: cut.clearanceTenthPencePerKg,
      minPackGrams: cut.minPackGrams,
      maxPackGrams: cut.maxPackGrams,
      looseDemandPacks: cut.looseDemandPacks,
      isSoldLoose: cut.isSoldLoose,
      version: cut.version,
    })
    .from(cut)
    .orderBy(asc(cut.name));
}

export async function findBoxKindVersion(db: Db | Tx, boxKindId: string): Promise<number | null> {
  const rows = await db.select({ version: boxKind.version }).from(boxKind).where(eq(boxKind.id, boxKindId));
  return rows[0]?.version ?? null;
}

/** False when another edit came first. */
export async function updateBoxKind(tx: Tx, boxKindId: string, edit: BoxKindEdit): Promise<boolean> {
  const { version, lines: _lines, ...values } = edit;
  const rows = await tx
    .update(boxKind)
    .set({ ...values, version: sql`${boxKind.version} + 1` })
    .where(and(eq(boxKind.id, boxKindId), eq(boxKind.version, version)))
    .returning({ id: boxKind.id });
  return rows.length === 1;
}

/** A swap costs and promises what its box does. */
export async function keepSwapsEqual(tx: Tx, boxKindId: string, edit: BoxKindEdit): Promise<void> {
  const { pricePence, guaranteedGrams } = edit;
  await tx
    .update(boxKind)
    .set({ pricePence, guaranteedGrams, version: sql`${boxKind.version} + 1` })
    .where(
      and(
        eq(boxKind.variantOfId, boxKindId),
        or(ne(boxKind.pricePence, pricePence), ne(boxKind.guaranteedGrams, guaranteedGrams)),
      ),
    );
}

/** Null when a box of this address exists already. */
export async function insertSwap(
  tx: Tx,
  swap: Omit<typeof boxKind.$inferInsert, 'id'> & { variantOfId: string },
): Promise<string | null> {
  const rows = await tx
    .insert(boxKind)
    .values(swap)
    .onConflictDoNothing({ target: boxKind.slug })
    .returning({ id: boxKind.id });
  return rows[0]?.id ?? null;
}

export async function replaceBoxLines(tx: Tx, boxKindId: string, lines: BoxKindEdit['lines']): Promise<void> {
  await tx.delete(boxLine).where(eq(boxLine.boxKindId, boxKindId));
  for (const [position, { cutIds, ...line }] of lines.entries()) {
    const rows = await tx
      .insert(boxLine)
      .values({ ...line, boxKindId, position })
      .returning({ id: boxLine.id });
    const boxLineId = rows[0]?.id;
    if (boxLineId) await tx.insert(boxLineCut).values(cutIds.map((cutId) => ({ boxLineId, cutId })));
  }
}
