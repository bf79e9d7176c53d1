import { boxKind, boxLine, boxLineCut, cut } from '#db/schema/products.ts';
import { carcase, cuttingDay, cuttingSpecification } from '#db/schema/carcases.ts';
import { farm } from '#db/schema/farm.ts';
import { animal } from '#db/schema/herd.ts';
import { offer } from '#db/schema/allocations.ts';
import { collectionPoint, collectionSlot } from '#db/schema/orders.ts';
import type { Db } from '#db/client.ts';
import { addDays, londonInstant, type Day } from '#shared/domain/day.ts';
import { earTagCheckDigit } from '#shared/domain/ear-tag.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';

/** One row that was just inserted. */
async function only<T>(rows: Promise<T[]>): Promise<T> {
  const row = (await rows)[0];
  if (!row) throw new Error('Nothing was inserted.');
  return row;
}

export function makeFarm(db: Db) {
  return only(
    db
      .insert(farm)
      .values({
        name: 'Skelderwick',
        businessName: 'Skelderwick Farm',
        addressLines: ['Skelderwick Farm', 'Under Rigg', 'ZZ1 1AA'],
        email: 'farm@example.com',
        phone: '01632 960100',
        story: 'Our own cattle, on our own grass.',
        abattoirName: 'Rowan Hill Abattoir',
        abattoirApprovalNo: 'ZZ 0001',
        cutterName: 'Rowan Hill Cutting',
        cutterApprovalNo: 'ZZ 0002',
        servingGrams: 165,
        freezerGramsPerLitre: 620,
      })
      .returning(),
  );
}

let animals = 0;

export function makeAnimal(db: Db, more: Partial<typeof animal.$inferInsert> = {}) {
  animals += 1;
  const number = 100_000 + animals;
  const tag = `UK123450${earTagCheckDigit(123_450, number % 100_000)}${String(number % 100_000).padStart(5, '0')}`;
  return only(
    db
      .insert(animal)
      .values({ earTag: tag, breed: 'Aberdeen Angus', sex: 'steer', born: '2024-11-20', liveGrams: 620_000, ...more })
      .returning(),
  );
}

export function makeSpecification(db: Db, more: Partial<typeof cuttingSpecification.$inferInsert> = {}) {
  return only(
    db
      .insert(cuttingSpecification)
      .values({ name: 'A side for tests', edition: 1, body: traditionalSide, ...more })
      .returning(),
  );
}

/** A cutting day nine days ahead, open, with its cut-off two days before at 18:00. */
export async function makeCuttingDay(db: Db, today: Day, more: Partial<typeof cuttingDay.$inferInsert> = {}) {
  const day = more.day ?? addDays(today, 9);
  const specificationId = more.specificationId ?? (await makeSpecification(db, { name: `Side for ${day}` })).id;
  return only(
    db
      .insert(cuttingDay)
      .values({ day, cutOffAt: londonInstant(addDays(day, -2), '18:00'), state: 'open', ...more, specificationId })
      .returning(),
  );
}

export async function makeCarcase(db: Db, dayId: string, more: Partial<typeof carcase.$inferInsert> = {}) {
  const animalId = more.animalId ?? (await makeAnimal(db)).id;
  return only(
    db
      .insert(carcase)
      .values({ cuttingDayId: dayId, killDay: '2026-11-20', liveGrams: 620_000, ...more, animalId })
      .returning(),
  );
}

export function makeCut(db: Db, id: string, more: Partial<typeof cut.$inferInsert> = {}) {
  return only(
    db
      .insert(cut)
      .values({
        id,
        name: id,
        description: 'For tests.',
        cooking: 'grill',
        tenthPencePerKg: 20_000,
        clearanceTenthPencePerKg: 5_000,
        minPackGrams: 300,
        maxPackGrams: 600,
        looseDemandPacks: 10,
        isSoldLoose: true,
        isFarmMinced: false,
        useByDays: 10,
        ...more,
      })
      .returning(),
  );
}

export async function makeBoxKind(
  db: Db,
  slug: string,
  more: Partial<typeof boxKind.$inferInsert> & { cutIds?: string[] } = {},
) {
  const { cutIds = [], ...columns } = more;
  const box = await only(
    db
      .insert(boxKind)
      .values({
        slug,
        name: slug,
        summary: 'A box for tests.',
        guaranteedGrams: 5_000,
        pricePence: 9_400,
        packagingPence: 300,
        demandBoxes: 40,
        position: 1,
        ...columns,
      })
      .returning(),
  );
  for (const [position, cutId] of cutIds.entries()) {
    const line = await only(
      db
        .insert(boxLine)
        .values({
          boxKindId: box.id,
          position,
          name: cutId,
          minGrams: 1_000,
          maxGrams: 6_000,
          minPacks: 1,
          maxPacks: null,
        })
        .returning(),
    );
    await db.insert(boxLineCut).values({ boxLineId: line.id, cutId });
  }
  return box;
}

export function makeBoxOffer(
  db: Db,
  dayId: string,
  box: { id: string; pricePence: number; guaranteedGrams: number },
  offered: number,
) {
  return only(
    db
      .insert(offer)
      .values({
        cuttingDayId: dayId,
        kind: 'box',
        productKey: `box:${box.id}`,
        boxKindId: box.id,
        offered,
        pricePence: box.pricePence,
        upperGrams: box.guaranteedGrams,
      })
      .returning(),
  );
}

export function makeLooseOffer(
  db: Db,
  dayId: string,
  cutId: string,
  more: { offered: number; pricePence: number; upperGrams: number },
) {
  return only(
    db
      .insert(offer)
      .values({ cuttingDayId: dayId, kind: 'loose', productKey: `loose:${cutId}`, cutId, ...more })
      .returning(),
  );
}

export async function makeSlot(
  db: Db,
  dayId: string,
  today: Day,
  more: Partial<typeof collectionSlot.$inferInsert> = {},
) {
  const pointId =
    more.pointId ??
    (
      await only(
        db
          .insert(collectionPoint)
          .values({
            name: 'The farm gate',
            addressLines: ['Skelderwick Farm', 'ZZ1 1AA'],
            directions: 'Up the lane past the chapel.',
            bring: 'A cool bag and your order number.',
          })
          .returning(),
      )
    ).id;
  const day = addDays(today, 10);
  return only(
    db
      .insert(collectionSlot)
      .values({
        cuttingDayId: dayId,
        startsAt: londonInstant(day, '10:00'),
        endsAt: londonInstant(day, '10:30'),
        capacity: 300,
        ...more,
        pointId,
      })
      .returning(),
  );
}
