import type { CarcaseSummary } from '#shared/contracts/carcases.ts';
import type { Day } from '#shared/domain/day.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatDayWithYear } from '#shared/domain/words.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { groupBy } from '#server/farm/group-by.ts';
import { listAnimalCarcases, listMedicines, lockAnimals, type AnimalRow } from '#server/herd/herd-queries.ts';
import { withdrawalClearDay } from '#server/herd/withdrawal.ts';
import { enqueue } from '#server/queue.ts';
import { insertCarcases } from './carcase-queries.ts';
import { lockCuttingDay, raiseFigures, type CuttingDayRow } from './cutting-day-queries.ts';
import { loadDayCutouts } from './day-figures.ts';
import { summariseCarcase } from './describe-carcase.ts';

type Booking = { animalIds: string[]; killDay: Day; cuttingDayId: string };

/** Books animals for a kill day: from then on they are carcases of one cutting day, on estimated weights. */
export async function bookCarcases(deps: Deps, byUserId: string, booking: Booking): Promise<CarcaseSummary[]> {
  return deps.db.transaction(async (tx) => {
    const day = await lockCuttingDay(tx, booking.cuttingDayId);
    if (!day) throw invalid({ cuttingDayId: 'There is no such cutting day.' });
    if (day.state === 'closed') throw new AppError('STATE_CHANGED', 'This cutting day is closed. Nothing was saved.');
    const animals = await lockAnimals(tx, booking.animalIds);
    refuse(fieldsOfBooking(booking, day, deps.clock.today()));
    refuse(await fieldsOfAnimals(tx, booking, animals));
    const ids = await insertCarcases(
      tx,
      animals.map((animal) => ({
        animalId: animal.id,
        cuttingDayId: day.id,
        killDay: booking.killDay,
        liveGrams: animal.liveGrams ?? 0,
      })),
    );
    await raiseFigures(tx, day.id);
    for (const subjectId of ids) {
      const detail = { killDay: booking.killDay, cuttingDay: day.day };
      await recordAudit(tx, { byUserId, action: 'booked', subject: 'carcase', subjectId, detail });
    }
    await enqueue(tx, 'replan-day', { dayId: day.id });
    const { carcases } = await loadDayCutouts(tx, day.id);
    return carcases.filter(({ row }) => ids.includes(row.id)).map(summariseCarcase);
  });
}

function fieldsOfBooking(booking: Booking, day: CuttingDayRow, today: Day): FieldErrors {
  if (booking.killDay < today) return { killDay: `This day has passed: today is ${formatDayWithYear(today)}.` };
  if (booking.killDay > day.day) {
    return { killDay: `This is after the cutting day, ${formatDayWithYear(day.day)}.` };
  }
  if (new Set(booking.animalIds).size < booking.animalIds.length) {
    return { animalIds: 'The same animal is named twice.' };
  }
  return {};
}

/** The first animal that may not be booked, with the day or the figure that stands in the way. */
async function fieldsOfAnimals(tx: Tx, booking: Booking, animals: readonly AnimalRow[]): Promise<FieldErrors> {
  if (animals.length < booking.animalIds.length) return { animalIds: 'One of these animals is not in the herd.' };
  const booked = new Map((await listAnimalCarcases(tx, booking.animalIds)).map((row) => [row.animalId, row]));
  const medicines = groupBy(await listMedicines(tx, booking.animalIds), (dose) => dose.animalId);
  for (const animal of animals) {
    const tag = formatEarTag(animal.earTag);
    const earlier = booked.get(animal.id);
    if (earlier) return { animalIds: `${tag} is booked already, for ${formatDayWithYear(earlier.killDay)}.` };
    if (booking.killDay < animal.born) {
      return { killDay: `${tag} was born on ${formatDayWithYear(animal.born)}, after this day.` };
    }
    const clear = withdrawalClearDay(medicines.get(animal.id) ?? []);
    if (clear && booking.killDay < clear) {
      return {
        killDay: `${tag} is inside a medicine's withdrawal period until ${formatDayWithYear(clear)}: choose that day or a later one.`,
      };
    }
    if (animal.liveGrams === null) {
      return { animalIds: `${tag} has no live weight yet: enter one in the herd, so that its cuts can be estimated.` };
    }
  }
  return {};
}

function refuse(fields: FieldErrors): void {
  if (Object.keys(fields).length > 0) throw invalid(fields);
}

function invalid(fields: FieldErrors): AppError {
  return new AppError('INVALID_INPUT', 'Nothing was booked: something is missing or not right.', { fields });
}
