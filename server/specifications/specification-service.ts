import type { SpecificationCopy, SpecificationDraft, SpecificationEdition } from '#shared/contracts/specifications.ts';
import { checkSpecification } from '#shared/engine/figures/check-specification.ts';
import { findShipped, SHIPPED_SPECIFICATIONS } from '#shared/engine/figures/shipped-specifications.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { AppError } from '#shared/errors.ts';
import { readSpecification } from '#server/carcases/day-figures.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import {
  findEdition,
  findLatestEdition,
  insertEdition,
  insertMissingCuts,
  listDaysOfEditions,
  listEditions,
  setRetired,
  type EditionRow,
  type NewEdition,
} from './specification-queries.ts';

type Days = Awaited<ReturnType<typeof listDaysOfEditions>>;

export async function listSpecifications(deps: Deps) {
  const days = await listDaysOfEditions(deps.db);
  const rows = await listEditions(deps.db);
  return {
    specifications: rows.map((row) => describeEdition(row, days)),
    shipped: SHIPPED_SPECIFICATIONS.map(({ id, name, source }) => ({ id, name, source })),
  };
}

export async function getSpecification(deps: Deps, specificationId: string) {
  const row = await getEdition(deps.db, specificationId);
  const latest = await findLatestEdition(deps.db, row.name);
  return {
    ...describeEdition(row, await listDaysOfEditions(deps.db)),
    latestEdition: latest?.edition ?? row.edition,
    latestId: latest?.id ?? row.id,
    body: await readSpecification(deps.db, specificationId),
  };
}

export async function getEdition(db: Db | Tx, specificationId: string): Promise<EditionRow> {
  const row = await findEdition(db, specificationId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such cutting specification.');
  return row;
}

function describeEdition(row: EditionRow, days: Days): SpecificationEdition {
  return {
    id: row.id,
    name: row.name,
    edition: row.edition,
    origin: row.origin,
    shippedId: findShipped(row.bodyId)?.id ?? null,
    isRetired: row.retiredAt !== null,
    createdAt: row.createdAt.toISOString(),
    days: days
      .filter(({ specificationId }) => specificationId === row.id)
      .map(({ id, day, state }) => ({ id, day, state })),
  };
}

/** A new edition beside the old ones: a cutting day keeps the edition that it was planned with. */
export async function saveSpecification(
  deps: Deps,
  byUserId: string,
  { name, basedOnEdition, body }: SpecificationDraft,
): Promise<SpecificationEdition> {
  checkSpecification(body);
  return deps.db.transaction((tx) =>
    addEdition(tx, byUserId, { name, basedOnEdition, body: { ...body, name }, origin: 'written' }),
  );
}

/** The figures that came with the program, as a new edition: what the farm changed stays in the editions before it. */
export async function restoreSpecification(
  deps: Deps,
  byUserId: string,
  { specificationId, basedOnEdition }: { specificationId: string; basedOnEdition: number },
): Promise<SpecificationEdition> {
  return deps.db.transaction(async (tx) => {
    const { name, bodyId } = await getEdition(tx, specificationId);
    const shipped = findShipped(bodyId);
    if (!shipped) {
      const message = 'This specification descends from none that came with the program. Nothing was changed.';
      throw new AppError('NOT_FOUND', message);
    }
    return addEdition(tx, byUserId, { name, basedOnEdition, body: { ...shipped, name }, origin: 'restored' });
  });
}

/** A name of its own, so that the farm's figures and the shipped ones stand beside each other. */
export async function copySpecification(
  deps: Deps,
  byUserId: string,
  { name, fromId }: SpecificationCopy,
): Promise<SpecificationEdition> {
  return deps.db.transaction(async (tx) => {
    const body = findShipped(fromId) ?? (await readCopied(tx, fromId));
    if (await findLatestEdition(tx, name)) throw nameTaken(name);
    return addEdition(tx, byUserId, { name, basedOnEdition: 0, body: { ...body, name }, origin: 'copied' });
  });
}

async function readCopied(tx: Tx, fromId: string): Promise<Specification> {
  const isId = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i.test(fromId);
  if (!isId) throw new AppError('NOT_FOUND', 'There is no such cutting specification.');
  return readSpecification(tx, fromId);
}

function nameTaken(name: string): AppError {
  const sentence = `There is a specification called ${name} already.`;
  return new AppError('ALREADY_KNOWN', `${sentence} Nothing was saved.`, { fields: { name: sentence } });
}

/** All editions together, both ways; asked twice it is as asked once. */
export async function retireSpecification(
  deps: Deps,
  byUserId: string,
  { specificationId, isRetired }: { specificationId: string; isRetired: boolean },
): Promise<SpecificationEdition> {
  return deps.db.transaction(async (tx) => {
    const before = await getEdition(tx, specificationId);
    if ((before.retiredAt !== null) !== isRetired) {
      await setRetired(tx, before.name, isRetired ? deps.clock.now() : null);
      const action = isRetired ? 'retired' : 'brought back';
      await recordAudit(tx, { ...about(before), byUserId, action });
    }
    return describeEdition(await getEdition(tx, specificationId), await listDaysOfEditions(tx));
  });
}

function about({ id, name, edition }: { id: string; name: string; edition: number }) {
  return { subject: 'cutting specification', subjectId: id, detail: { name, edition } };
}

type Addition = {
  name: string;
  basedOnEdition: number;
  body: Specification;
  origin: NonNullable<NewEdition['origin']>;
};

/** Refuses when the name has moved on since `basedOnEdition`: the second of two editors is told, nothing is overwritten. */
export async function addEdition(tx: Tx, byUserId: string, addition: Addition): Promise<SpecificationEdition> {
  const { name, basedOnEdition, body, origin } = addition;
  const present = await findLatestEdition(tx, name);
  if (present && present.retiredAt !== null) {
    const message = `${name} is retired. Bring it back first; nothing of yours was saved.`;
    throw new AppError('STATE_CHANGED', message);
  }
  const isFresh = (present?.edition ?? 0) === basedOnEdition;
  const id = isFresh ? await insertEdition(tx, { name, edition: basedOnEdition + 1, body, origin }) : null;
  if (!id) throw staleEdition(basedOnEdition, (await findLatestEdition(tx, name))?.edition ?? 0);
  await insertMissingCuts(tx, body.cuts);
  const row = await getEdition(tx, id);
  await recordAudit(tx, { ...about(row), byUserId, action: origin });
  return describeEdition(row, []);
}

function staleEdition(yourEdition: number, presentEdition: number): AppError {
  return new AppError(
    'STATE_CHANGED',
    `Edition ${presentEdition} has been saved since you started from edition ${yourEdition}. Nothing of yours was saved; compare the two first.`,
    { figures: { yourEdition, presentEdition } },
  );
}
