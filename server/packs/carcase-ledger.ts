import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatGrams } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { CarcaseFigures } from '#server/carcases/day-figures.ts';
import { listBalances, listLedgerCarcases, recordMovements } from '#server/carcases/ledger-queries.ts';
import type { Tx } from '#server/deps.ts';

/** Scales and estimates differ: what leaves a carcase may outweigh its cold weight by this share before it must be an error. */
const OVERWEIGHT_PERCENT = 2;

/** The cold weight is what the abattoir handed over: whatever leaves the carcase first brings it into the ledger. */
export async function enterLedger(tx: Tx, { row, cutout }: CarcaseFigures, byUserId: string): Promise<void> {
  const known = await listLedgerCarcases(tx, [row.id]);
  if (known.has(row.id)) return;
  const movement = { carcaseId: row.id, fromPlace: null, toPlace: 'carcase' as const, byUserId };
  await recordMovements(tx, [{ ...movement, grams: cutout.cold.grams, reason: 'cold weight' }]);
}

/** Refuses to take more out of a carcase than can still be there. */
export async function refuseTooMuch(tx: Tx, { row, cutout }: CarcaseFigures, wantedGrams: number): Promise<void> {
  const balances = await listBalances(tx, [row.id]);
  const left = balances.find(({ place }) => place === 'carcase')?.grams ?? 0;
  const allowed = left + Math.floor((cutout.cold.grams * OVERWEIGHT_PERCENT) / 100);
  if (wantedGrams <= allowed) return;
  throw new AppError(
    'MEASURED_EXCEEDS_PARENT',
    `The scale says ${formatGrams(wantedGrams)}, but of ${formatEarTag(row.animal.earTag)} only ${formatGrams(left)} are left. Nothing was booked; check the beast and the scale.`,
    { figures: { wantedGrams, leftGrams: left } },
  );
}
