import type { BoxKind, BoxKindEdit, Cut } from '#shared/contracts/office.ts';
import type { Recipe } from '#shared/engine/allocation/allocation-input.ts';
import { checkRecipe } from '#shared/engine/allocation/check-recipe.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import { listBoxKinds as listKindRows, type BoxKindRow } from '#server/allocation/allocation-queries.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import {
  findBoxKindVersion,
  insertSwap,
  keepSwapsEqual,
  listOfficeCuts,
  replaceBoxLines,
  updateBoxKind,
} from './box-kind-queries.ts';

export async function listBoxKinds(deps: Deps): Promise<{ boxKinds: BoxKind[]; cuts: Cut[] }> {
  return { boxKinds: (await listKindRows(deps.db)).map(toBoxKind), cuts: await listOfficeCuts(deps.db) };
}

/** A new recipe counts from the next allocation on; boxes that are sold keep the guarantee and price they were sold with. */
export async function editBoxKind(
  deps: Deps,
  byUserId: string,
  { boxKindId, edit }: { boxKindId: string; edit: BoxKindEdit },
): Promise<BoxKind> {
  return deps.db.transaction(async (tx) => {
    const before = await getBoxKind(tx, boxKindId);
    await refuseOwnPrice(tx, boxKindId, edit);
    refuseLines(edit, await listOfficeCuts(tx));
    if (!(await updateBoxKind(tx, boxKindId, edit))) {
      throw new AppError(
        'STATE_CHANGED',
        'Somebody else changed this box while you were editing it. Nothing of yours was saved; look at it again.',
        { figures: { yourVersion: edit.version, presentVersion: await findBoxKindVersion(tx, boxKindId) } },
      );
    }
    await replaceBoxLines(tx, boxKindId, edit.lines);
    await keepSwapsEqual(tx, boxKindId, edit);
    const detail = { from: before, to: edit };
    await recordAudit(tx, { byUserId, action: 'edited', subject: 'box kind', subjectId: boxKindId, detail });
    return getBoxKind(tx, boxKindId);
  });
}

/** A swap begins as its box under another name; the owner then changes its recipe and offers it. */
export async function addSwap(
  deps: Deps,
  byUserId: string,
  { boxKindId, name }: { boxKindId: string; name: string },
): Promise<BoxKind> {
  return deps.db.transaction(async (tx) => {
    const box = (await listKindRows(tx)).find((kind) => kind.id === boxKindId);
    if (!box) throw new AppError('NOT_FOUND', 'There is no such box.');
    if (box.variantOfId) throw new AppError('STATE_CHANGED', 'This is a swap itself. Add one to its box instead.');
    const { guaranteedGrams, pricePence, packagingPence, summary, position } = box;
    const copied = { guaranteedGrams, pricePence, packagingPence, summary, position };
    const slug = `${box.slug}-${name.toLowerCase().replace(/[^a-z0-9]+/g, '-')}`.replace(/-+$/, '').slice(0, 60);
    const swapId = await insertSwap(tx, {
      ...{ ...copied, name, slug },
      ...{ demandBoxes: 0, isActive: false, variantOfId: box.id },
    });
    if (!swapId) {
      const words = 'This box has a swap of that name already.';
      throw new AppError('ALREADY_KNOWN', `${words} Nothing was added.`, { fields: { name: words } });
    }
    await replaceBoxLines(tx, swapId, toBoxKind(box).lines);
    await recordAudit(tx, {
      byUserId,
      action: 'added a swap',
      subject: 'box kind',
      subjectId: swapId,
      detail: { name },
    });
    return getBoxKind(tx, swapId);
  });
}

async function getBoxKind(db: Db | Tx, boxKindId: string): Promise<BoxKind> {
  const row = (await listKindRows(db)).find((kind) => kind.id === boxKindId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such box.');
  return toBoxKind(row);
}

function toBoxKind(row: BoxKindRow): BoxKind {
  return {
    id: row.id,
    slug: row.slug,
    swapOfId: row.variantOfId,
    version: row.version,
    name: row.name,
    summary: row.summary,
    guaranteedGrams: row.guaranteedGrams,
    pricePence: row.pricePence,
    packagingPence: row.packagingPence,
    demandBoxes: row.demandBoxes,
    isActive: row.isActive,
    lines: row.lines.map(({ name, minGrams, maxGrams, minPacks, maxPacks, cutIds }) => ({
      name,
      minGrams,
      maxGrams,
      minPacks,
      maxPacks,
      cutIds,
    })),
  };
}

/** Who swaps pays nothing and gets nothing back, so a swap has no price and no guarantee of its own. */
async function refuseOwnPrice(tx: Tx, boxKindId: string, edit: BoxKindEdit): Promise<void> {
  const kinds = await listKindRows(tx);
  const box = kinds.find((kind) => kind.id === kinds.find(({ id }) => id === boxKindId)?.variantOfId);
  if (!box) return;
  const fields: FieldErrors = {};
  const words = `This is a swap of ${box.name}: change it there.`;
  if (edit.pricePence !== box.pricePence) fields.pricePence = words;
  if (edit.guaranteedGrams !== box.guaranteedGrams) fields.guaranteedGrams = words;
  if (Object.keys(fields).length === 0) return;
  throw new AppError('INVALID_INPUT', 'Nothing was saved: a swap costs and weighs what its box does.', { fields });
}

/** What can be said beside a field is said there; what only whole packs show is the engine's refusal. */
function refuseLines(edit: BoxKindEdit, cuts: readonly Cut[]): void {
  const fields: FieldErrors = {};
  const known = new Set(cuts.map((cut) => cut.id));
  for (const [index, line] of edit.lines.entries()) {
    const at = `lines.${index}`;
    if (line.maxGrams < line.minGrams) fields[`${at}.maxGrams`] = 'The most is less than the least.';
    if (line.maxPacks !== null && line.maxPacks < line.minPacks) {
      fields[`${at}.maxPacks`] = 'The most is less than the least.';
    }
    if (line.cutIds.some((id) => !known.has(id))) fields[`${at}.cutIds`] = 'There is no such cut.';
    if (new Set(line.cutIds).size < line.cutIds.length) fields[`${at}.cutIds`] = 'The same cut is named twice.';
  }
  if (Object.keys(fields).length > 0) {
    throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', { fields });
  }
  checkRecipe(edit.name, toRecipe(edit), new Map(cuts.map((cut) => [cut.id, cut])));
}

function toRecipe(edit: BoxKindEdit): Recipe {
  return {
    guaranteedGrams: edit.guaranteedGrams,
    lines: edit.lines.map((line, index) => ({ ...line, id: String(index), state: 'either' })),
  };
}
