import type { CuttingDay, NewCuttingDay } from '#shared/contracts/carcases.ts';
import { londonInstant, type Day } from '#shared/domain/day.ts';
import { formatDayWithYear } from '#shared/domain/words.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import {
  countOrders,
  findDayOn,
  findSpecification,
  insertDay,
  insertSlots,
  listDays,
  listPoints,
} from './cutting-day-queries.ts';
import { loadDayCutouts } from './day-figures.ts';
import { summariseCarcase } from './describe-carcase.ts';

type Collection = NewCuttingDay['collections'][number];
type Slot = { pointId: string; startsAt: Date; endsAt: Date; capacity: number };

const MS_PER_MINUTE = 60_000;

export async function listCuttingDays(deps: Deps): Promise<CuttingDay[]> {
  const days: CuttingDay[] = [];
  for (const day of await listDays(deps.db)) days.push(await getCuttingDay(deps.db, day.id));
  return days;
}

export async function getCuttingDay(db: Db | Tx, dayId: string): Promise<CuttingDay> {
  const { day, carcases } = await loadDayCutouts(db, dayId);
  const orders = await countOrders(db, [dayId]);
  return {
    id: day.id,
    day: day.day,
    cutOffAt: day.cutOffAt.toISOString(),
    state: day.state,
    specificationId: day.specificationId,
    specificationName: day.specificationName,
    figuresVersion: day.figuresVersion,
    version: day.version,
    carcases: carcases.map(summariseCarcase),
    coldGrams: carcases.reduce((sum, carcase) => sum + carcase.cutout.cold.grams, 0),
    orders: orders.get(dayId) ?? 0,
  };
}

export async function addCuttingDay(deps: Deps, byUserId: string, wanted: NewCuttingDay): Promise<CuttingDay> {
  const cutOffAt = londonInstant(wanted.cutOffDay, wanted.cutOffTime);
  return deps.db.transaction(async (tx) => {
    const fields = { ...fieldsOfDates(deps, wanted, cutOffAt), ...(await fieldsOfReferences(tx, wanted)) };
    if (Object.keys(fields).length > 0) {
      throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', { fields });
    }
    const row = { day: wanted.day, cutOffAt, specificationId: wanted.specificationId };
    const dayId = (await findDayOn(tx, wanted.day)) ? null : await insertDay(tx, row);
    if (!dayId) throw dayKnown(wanted.day);
    for (const [index, collection] of wanted.collections.entries()) {
      const slots = slotsOf(collection);
      const opened = await insertSlots(
        tx,
        slots.map((slot) => ({ ...slot, cuttingDayId: dayId })),
      );
      if (opened < slots.length) throw slotsKnown(index);
    }
    await recordAudit(tx, {
      byUserId,
      action: 'added',
      subject: 'cutting day',
      subjectId: dayId,
      detail: { ...wanted },
    });
    return getCuttingDay(tx, dayId);
  });
}

export async function listCollectionPoints(deps: Deps): Promise<{ id: string; name: string }[]> {
  return listPoints(deps.db);
}

function fieldsOfDates(deps: Deps, wanted: NewCuttingDay, cutOffAt: Date): FieldErrors {
  const fields: FieldErrors = {};
  const today = deps.clock.today();
  if (wanted.day < today) fields.day = `This day has passed: today is ${formatDayWithYear(today)}.`;
  if (wanted.cutOffDay > wanted.day) fields.cutOffDay = 'The cut-off comes after the cutting day.';
  else if (cutOffAt <= deps.clock.now()) fields.cutOffDay = 'This cut-off has passed: nobody could order.';
  for (const [index, collection] of wanted.collections.entries()) {
    const at = `collections.${index}`;
    if (collection.day < wanted.day) fields[`${at}.day`] = 'Nothing is cut yet on this day.';
    if (collection.from >= collection.to) fields[`${at}.to`] = 'The end comes before the start.';
    else if (slotsOf(collection).length === 0) fields[`${at}.slotMinutes`] = 'No slot of this length fits in.';
  }
  return fields;
}

async function fieldsOfReferences(tx: Tx, wanted: NewCuttingDay): Promise<FieldErrors> {
  const fields: FieldErrors = {};
  const specification = await findSpecification(tx, wanted.specificationId);
  if (!specification) fields.specificationId = 'There is no such cutting specification.';
  else if (specification.retiredAt !== null) fields.specificationId = 'This cutting specification is retired.';
  const points = new Set((await listPoints(tx)).map((point) => point.id));
  for (const [index, collection] of wanted.collections.entries()) {
    if (!points.has(collection.pointId)) fields[`collections.${index}.pointId`] = 'There is no such collection point.';
  }
  return fields;
}

/** Whole slots only: what is left of the time is too short for one. */
function slotsOf({ pointId, day, from, to, slotMinutes, capacity }: Collection): Slot[] {
  const step = slotMinutes * MS_PER_MINUTE;
  const end = londonInstant(day, to).getTime();
  const slots: Slot[] = [];
  for (let start = londonInstant(day, from).getTime(); start + step <= end; start += step) {
    slots.push({ pointId, startsAt: new Date(start), endsAt: new Date(start + step), capacity });
  }
  return slots;
}

function dayKnown(day: Day): AppError {
  const sentence = `${formatDayWithYear(day)} is a cutting day already.`;
  return new AppError('ALREADY_KNOWN', `${sentence} Nothing was saved.`, { fields: { day: sentence } });
}

function slotsKnown(index: number): AppError {
  const sentence = 'This collection point is open at that time already.';
  return new AppError('ALREADY_KNOWN', `${sentence} Nothing was saved.`, {
    fields: { [`collections.${index}.from`]: sentence },
  });
}
