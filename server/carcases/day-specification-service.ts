import type { CuttingDay } from '#shared/contracts/carcases.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { enqueue } from '#server/queue.ts';
import {
  findSpecification,
  lockCuttingDay,
  raiseFigures,
  setDaySpecification,
  type CuttingDayRow,
} from './cutting-day-queries.ts';
import { getCuttingDay } from './cutting-day-service.ts';

export type SpecificationChoice = { dayId: string; version: number; specificationId: string };

/**
 * Another way to cut a day that is not on sale yet. Its figures are a new version, so that every plan made before is out
 * of date. What was weighed must be foreseen by the new specification too, or nothing changes.
 */
export async function chooseSpecification(
  deps: Deps,
  byUserId: string,
  { dayId, version, specificationId }: SpecificationChoice,
): Promise<CuttingDay> {
  return deps.db.transaction(async (tx) => {
    const day = await lockCuttingDay(tx, dayId);
    if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
    refuseOnSale(day);
    await refuseUnknownOrRetired(tx, specificationId);
    if (!(await setDaySpecification(tx, dayId, { version, specificationId }))) {
      throw new AppError(
        'STATE_CHANGED',
        'Somebody else changed this cutting day meanwhile. Nothing of yours was saved; look at it again.',
        { figures: { yourVersion: version, presentVersion: day.version } },
      );
    }
    await raiseFigures(tx, dayId);
    const detail = { from: day.specificationId, to: specificationId };
    const subject = { subject: 'cutting day', subjectId: dayId };
    await recordAudit(tx, { byUserId, action: 'specification chosen', ...subject, detail });
    await enqueue(tx, 'replan-day', { dayId });
    return getCuttingDay(tx, dayId);
  });
}

function refuseOnSale({ state }: CuttingDayRow): void {
  if (state === 'planned') return;
  const why = state === 'open' ? 'is on sale' : 'is closed';
  throw new AppError('STATE_CHANGED', `This cutting day ${why}: it keeps its specification. Nothing was changed.`);
}

async function refuseUnknownOrRetired(tx: Tx, specificationId: string): Promise<void> {
  const row = await findSpecification(tx, specificationId);
  if (row && row.retiredAt === null) return;
  const sentence = row ? 'This cutting specification is retired.' : 'There is no such cutting specification.';
  throw new AppError('INVALID_INPUT', `${sentence} Nothing was changed.`, { fields: { specificationId: sentence } });
}
