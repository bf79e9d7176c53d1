import type { Carcase } from '#shared/contracts/carcases.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Tx } from '#server/deps.ts';
import { findCarcase, type CarcaseOfDay } from './carcase-queries.ts';
import { loadDayCutouts, type CarcaseFigures, type DayCutouts } from './day-figures.ts';
import { describeCarcase } from './describe-carcase.ts';
import { readPublishedWays, readRails } from './published-plan.ts';

export async function getCarcase(db: Db | Tx, carcaseId: string): Promise<Carcase> {
  const { day, figures } = await loadCarcase(db, carcaseId);
  return describeCarcase(figures, day.specification, await readRails(db, figures, day.specification));
}

export async function getCarcaseRow(db: Db | Tx, carcaseId: string): Promise<CarcaseOfDay> {
  const row = await findCarcase(db, carcaseId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such carcase.');
  return row;
}

/** Cut as the published plan says, or by the first open ways before there is one. */
export async function loadCarcase(
  db: Db | Tx,
  carcaseId: string,
): Promise<{ day: DayCutouts; figures: CarcaseFigures }> {
  const row = await getCarcaseRow(db, carcaseId);
  const day = await loadDayCutouts(db, row.cuttingDayId, await readPublishedWays(db, row.cuttingDayId));
  const figures = day.carcases.find((carcase) => carcase.row.id === carcaseId);
  if (!figures) throw new AppError('NOT_FOUND', 'There is no such carcase.');
  return { day, figures };
}

/** The second of two editors is told; nothing of theirs is saved. */
export function refuseStaleCarcase(yourVersion: number, presentVersion: number): AppError {
  return new AppError(
    'STATE_CHANGED',
    'Somebody else changed this carcase while you were editing it. Nothing of yours was saved; look at it again.',
    { figures: { yourVersion, presentVersion } },
  );
}
