import { Specification } from '#shared/engine/figures/specification.ts';
import { checkSpecification } from '#shared/engine/figures/check-specification.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { fieldsOf } from '#server/http/problem.ts';
import { findSpecification, insertSpecification, latestEdition, listSpecificationRows } from './cutting-day-queries.ts';

export type SpecificationSummary = { id: string; name: string; edition: number };
export type SpecificationDraft = { name: string; basedOnEdition: number; body: Record<string, unknown> };

export function listSpecifications(deps: Deps): Promise<SpecificationSummary[]> {
  return listSpecificationRows(deps.db);
}

export async function getSpecification(
  deps: Deps,
  specificationId: string,
): Promise<SpecificationSummary & { body: Record<string, unknown> }> {
  const row = await findSpecification(deps.db, specificationId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such cutting specification.');
  return { id: row.id, name: row.name, edition: row.edition, body: Specification.parse(row.body) };
}

/** A new edition beside the old ones: a cutting day keeps the edition that it was planned with. */
export async function saveSpecification(
  deps: Deps,
  byUserId: string,
  draft: SpecificationDraft,
): Promise<SpecificationSummary> {
  const parsed = Specification.safeParse(draft.body);
  if (!parsed.success) {
    const fields = Object.entries(fieldsOf(parsed.error)).map(([path, sentence]) => [`body.${path}`, sentence]);
    throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', {
      fields: Object.fromEntries(fields) as Record<string, string>,
    });
  }
  checkSpecification(parsed.data);
  return deps.db.transaction(async (tx) => {
    const present = await latestEdition(tx, draft.name);
    const row =
      present === draft.basedOnEdition
        ? await insertSpecification(tx, { name: draft.name, edition: present + 1, body: parsed.data })
        : null;
    if (!row) throw staleEdition(draft.basedOnEdition, await latestEdition(tx, draft.name));
    await recordAudit(tx, {
      byUserId,
      action: 'saved',
      subject: 'cutting specification',
      subjectId: row.id,
      detail: { name: row.name, edition: row.edition },
    });
    return { id: row.id, name: row.name, edition: row.edition };
  });
}

function staleEdition(yourEdition: number, presentEdition: number): AppError {
  return new AppError(
    'STATE_CHANGED',
    `Edition ${presentEdition} has been saved since you started from edition ${yourEdition}. Nothing of yours was saved; compare the two first.`,
    { figures: { yourEdition, presentEdition } },
  );
}
