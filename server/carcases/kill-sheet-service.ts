import type { Carcase, KillSheet } from '#shared/contracts/carcases.ts';
import type { Day } from '#shared/domain/day.ts';
import { formatDayWithYear, formatGrams } from '#shared/domain/words.ts';
import { WEIGHING_TOLERANCE_PER_MILLE } from '#shared/engine/cutout/measured-weights.ts';
import { ACCEPTED_GRAMS, coldFromHot } from '#shared/engine/cutout/weight-chain.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { listMedicines } from '#server/herd/herd-queries.ts';
import { withdrawalClearDay } from '#server/herd/withdrawal.ts';
import { enqueue } from '#server/queue.ts';
import { updateCarcase, type CarcaseOfDay } from './carcase-queries.ts';
import { getCarcase, getCarcaseRow, refuseStaleCarcase } from './carcase-service.ts';
import { lockCuttingDay, raiseFigures } from './cutting-day-queries.ts';

const [MIN_COLD_GRAMS, MAX_COLD_GRAMS] = ACCEPTED_GRAMS.cold;

export type KillSheetEntry = KillSheet & { carcaseId: string };

/** The abattoir's figures replace the estimate; every plan that rests on the old ones is out of date from here on. */
export async function enterKillSheet(deps: Deps, byUserId: string, sheet: KillSheetEntry): Promise<Carcase> {
  return deps.db.transaction(async (tx) => {
    const { cuttingDayId } = await getCarcaseRow(tx, sheet.carcaseId);
    const day = await lockCuttingDay(tx, cuttingDayId);
    const before = await getCarcaseRow(tx, sheet.carcaseId);
    refuseOnceCut(before, day?.state === 'closed');
    await refuseFields(tx, sheet, { before, today: deps.clock.today() });
    const values = {
      killDay: sheet.killDay,
      hotGrams: sheet.weighedAs === 'hot' ? sheet.grams : null,
      coldGrams: sheet.weighedAs === 'cold' ? sheet.grams : null,
      leftGrams: sheet.leftGrams ?? null,
      rightGrams: sheet.rightGrams ?? null,
      conformation: sheet.conformation,
      fatClass: sheet.fatClass,
      dressingSpec: sheet.dressingSpec || null,
      state: sheet.killDay < deps.clock.today() ? ('hanging' as const) : ('killed' as const),
    };
    if (!(await updateCarcase(tx, before.id, { version: sheet.version, values }))) {
      throw refuseStaleCarcase(sheet.version, before.version);
    }
    await raiseFigures(tx, cuttingDayId);
    const { version: _version, carcaseId, ...detail } = sheet;
    await recordAudit(tx, { byUserId, action: 'kill sheet', subject: 'carcase', subjectId: carcaseId, detail });
    await enqueue(tx, 'replan-day', { dayId: cuttingDayId });
    return getCarcase(tx, carcaseId);
  });
}

function refuseOnceCut(before: CarcaseOfDay, isDayClosed: boolean): void {
  if (!isDayClosed && before.state !== 'cut' && before.state !== 'sold through') return;
  throw new AppError(
    'STATE_CHANGED',
    'This carcase has been cut and packed: its kill sheet stays as it is. Nothing was saved.',
  );
}

async function refuseFields(
  tx: Tx,
  sheet: KillSheetEntry,
  { before, today }: { before: CarcaseOfDay; today: Day },
): Promise<void> {
  refuseWeight(sheet);
  refuseSides(sheet);
  const killDay = await sentenceAboutKillDay(tx, sheet.killDay, { before, today });
  if (killDay) throw invalid({ killDay });
}

function refuseWeight(sheet: KillSheetEntry): void {
  const coldGrams = sheet.weighedAs === 'hot' ? coldFromHot(sheet.grams) : sheet.grams;
  if (coldGrams >= MIN_COLD_GRAMS && coldGrams <= MAX_COLD_GRAMS) return;
  const sentence = `A cold carcase weighs between 50 kg and 700 kg; this one would weigh ${formatGrams(coldGrams)}.`;
  throw new AppError('WEIGHT_OUT_OF_RANGE', `${sentence} Nothing was saved.`, {
    fields: { grams: sentence },
    figures: { coldGrams, minGrams: MIN_COLD_GRAMS, maxGrams: MAX_COLD_GRAMS },
  });
}

/** The sides are both there or neither, and differ from the whole by no more than scales do. */
function refuseSides({ grams, leftGrams, rightGrams }: KillSheetEntry): void {
  const left = leftGrams ?? null;
  const right = rightGrams ?? null;
  if (left === null && right === null) return;
  if (left === null) throw invalid({ leftGrams: 'Give the other side too, or neither.' });
  if (right === null) throw invalid({ rightGrams: 'Give the other side too, or neither.' });
  const [low, high] = ACCEPTED_GRAMS.side;
  if (left < low || left > high) throw invalid({ leftGrams: 'A side weighs between 20 kg and 360 kg.' });
  if (right < low || right > high) throw invalid({ rightGrams: 'A side weighs between 20 kg and 360 kg.' });
  const partsGrams = left + right;
  if (Math.abs(partsGrams - grams) * 1000 <= grams * WEIGHING_TOLERANCE_PER_MILLE) return;
  const sentence = `Both sides weigh ${formatGrams(partsGrams)}, the whole ${formatGrams(grams)}: more than 0.5 % apart.`;
  throw new AppError('MEASURED_EXCEEDS_PARENT', `${sentence} Nothing was saved; check the sheet.`, {
    fields: { grams: sentence },
    figures: { partsGrams, parentGrams: grams, differenceGrams: partsGrams - grams },
  });
}

async function sentenceAboutKillDay(
  tx: Tx,
  killDay: Day,
  { before, today }: { before: CarcaseOfDay; today: Day },
): Promise<string | null> {
  if (killDay > today) return `This day is still to come: today is ${formatDayWithYear(today)}.`;
  if (killDay > before.day) return `This is after the cutting day, ${formatDayWithYear(before.day)}.`;
  if (killDay < before.animal.born) return `The animal was born on ${formatDayWithYear(before.animal.born)}.`;
  const clear = withdrawalClearDay(await listMedicines(tx, [before.animalId]));
  if (clear && killDay < clear) {
    return `A medicine's withdrawal period runs until ${formatDayWithYear(clear)}: speak to the official veterinarian before any of this carcase is sold.`;
  }
  return null;
}

function invalid(fields: FieldErrors): AppError {
  return new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', { fields });
}
