import { eq } from 'drizzle-orm';
import type { Db } from '#db/client.ts';
import { cuttingDay, weighing } from '#db/schema/carcases.ts';
import { getCarcase } from '#server/carcases/carcase-service.ts';
import { addDays, type Day } from '#shared/domain/day.ts';
import { makeAnimal, makeCarcase, makeCuttingDay } from './make-farm.ts';

type WeighedDay = {
  specificationId: string;
  day: Day;
  carcases: number;
  /** Weighed over foreseen by path below a side, in parts of 1,000: `fore/brisket` -> 1,080. */
  perMille: Readonly<Record<string, number>>;
  state?: 'planned' | 'open' | 'closed';
};

/** A cutting day whose carcases were weighed on both sides as given, closed unless said otherwise. */
export async function makeWeighedDay(db: Db, { specificationId, day, carcases, perMille, state }: WeighedDay) {
  const row = await makeCuttingDay(db, day, { day, specificationId, state: 'planned' });
  const ids: string[] = [];
  for (let at = 0; at < carcases; at += 1) {
    const animal = await makeAnimal(db, { born: addDays(day, -26 * 30) });
    const { id } = await makeCarcase(db, row.id, {
      animalId: animal.id,
      killDay: addDays(day, -14),
      coldGrams: 338_000 + at * 4_000,
      conformation: 'R',
      fatClass: '4L',
      state: 'sold through',
    });
    const { nodes } = await getCarcase(db, id);
    const rows = (['left', 'right'] as const).flatMap((side) =>
      Object.entries(perMille).map(([path, share]) => {
        const node = `${side}/${path}`;
        const foreseen = nodes.find((one) => one.path === node)?.estimatedGrams;
        if (foreseen === undefined) throw new Error(`There is no ${node}.`);
        return { carcaseId: id, node, grams: Math.round((foreseen * share) / 1000) };
      }),
    );
    if (rows.length > 0) await db.insert(weighing).values(rows);
    ids.push(id);
  }
  await db
    .update(cuttingDay)
    .set({ state: state ?? 'closed' })
    .where(eq(cuttingDay.id, row.id));
  return { dayId: row.id, carcaseIds: ids };
}
