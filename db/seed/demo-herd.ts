import type { Tx } from '#db/client.ts';
import { animal, medicineRecord } from '#db/schema/herd.ts';
import type { KillSheet } from '#shared/contracts/carcases.ts';
import { addDays, addMonths, type Day } from '#shared/domain/day.ts';
import { earTagCheckDigit } from '#shared/domain/ear-tag.ts';
import type { Chance } from './chance.ts';

/** The herd mark of the published example series: no farm of that number is meant. */
const HERD_MARK = 123_450;
const BREEDS = ['Aberdeen Angus', 'Aberdeen Angus cross', 'Beef Shorthorn', 'Hereford', 'Hereford cross'];

type NewAnimal = typeof animal.$inferInsert;
type Sex = NewAnimal['sex'];

type Sheet = Pick<KillSheet, 'weighedAs' | 'grams' | 'conformation' | 'fatClass'>;

/** Beasts that the demo kills, with what the abattoir will say of them. */
export type KillPlan = {
  sex: Sex;
  breed: string;
  ageMonths: number;
  liveGrams: number;
  sheet: Sheet;
};

const sheet = (
  weighedAs: Sheet['weighedAs'],
  grams: number,
  [conformation, fatClass]: [Sheet['conformation'], Sheet['fatClass']],
): Sheet => ({
  weighedAs,
  grams,
  conformation,
  fatClass,
});

/** Two beasts for each of the three days. The last heifer is over thirty months: her bone-in ways stay closed. */
export const KILL_PLANS = {
  past: [
    {
      sex: 'steer',
      breed: 'Aberdeen Angus cross',
      ageMonths: 25,
      liveGrams: 628_000,
      sheet: sheet('hot', 346_800, ['R', '4L']),
    },
    {
      sex: 'heifer',
      breed: 'Beef Shorthorn',
      ageMonths: 27,
      liveGrams: 561_000,
      sheet: sheet('cold', 293_400, ['O+', '4L']),
    },
  ],
  next: [
    {
      sex: 'steer',
      breed: 'Aberdeen Angus cross',
      ageMonths: 24,
      liveGrams: 646_000,
      sheet: sheet('hot', 356_200, ['R', '4L']),
    },
    {
      sex: 'steer',
      breed: 'Hereford cross',
      ageMonths: 28,
      liveGrams: 618_000,
      sheet: sheet('cold', 328_600, ['O+', '3']),
    },
  ],
  second: [
    {
      sex: 'steer',
      breed: 'Beef Shorthorn',
      ageMonths: 25,
      liveGrams: 655_000,
      sheet: sheet('hot', 352_000, ['R', '3']),
    },
    {
      sex: 'heifer',
      breed: 'Aberdeen Angus',
      ageMonths: 31,
      liveGrams: 578_000,
      sheet: sheet('hot', 306_000, ['R', '4L']),
    },
  ],
} as const satisfies Record<string, readonly KillPlan[]>;

export type KillDays = Record<keyof typeof KILL_PLANS, Day>;
export type DemoHerd = Record<keyof typeof KILL_PLANS, string[]>;

/** About 140 head: suckler cows, this year's calves, last year's stores and those that are finished. */
export async function insertHerd(
  tx: Tx,
  chance: Chance,
  { today, killDays }: { today: Day; killDays: KillDays },
): Promise<DemoHerd> {
  const nextTag = makeEarTags();
  const cows = Array.from({ length: 58 }, () => cow(chance, today, nextTag));
  const dam = () => chance.pick(cows).earTag;
  const calves = Array.from({ length: 44 }, () =>
    young(chance, { today, months: [2, 9], earTag: nextTag(), dam: dam() }),
  );
  const stores = Array.from({ length: 32 }, () =>
    young(chance, { today, months: [12, 22], earTag: nextTag(), dam: dam() }),
  );
  const rows = await tx
    .insert(animal)
    .values([...cows, ...calves, ...stores])
    .returning({ id: animal.id, born: animal.born });
  await insertMedicines(tx, chance, { today, animals: rows });
  const killed = {} as DemoHerd;
  for (const [key, plans] of Object.entries(KILL_PLANS) as [keyof DemoHerd, readonly KillPlan[]][]) {
    const beasts = plans.map((plan) => finished(plan, { killDay: killDays[key], earTag: nextTag(), dam: dam() }));
    const inserted = await tx.insert(animal).values(beasts).returning({ id: animal.id, earTag: animal.earTag });
    killed[key] = beasts.map((beast) => inserted.find((row) => row.earTag === beast.earTag)?.id ?? '');
  }
  return killed;
}

function makeEarTags(): () => string {
  let number = 0;
  return () => {
    number += 1;
    const digits = String(number).padStart(5, '0');
    return `UK${HERD_MARK}${earTagCheckDigit(HERD_MARK, number)}${digits}`;
  };
}

function cow(chance: Chance, today: Day, nextTag: () => string): NewAnimal {
  const born = addDays(addMonths(today, -12 * chance.between(3, 11)), -chance.between(0, 90));
  const liveGrams = chance.between(0, 2) === 0 ? chance.between(610, 730) * 1_000 : null;
  return { earTag: nextTag(), breed: chance.pick(BREEDS), sex: 'cow', born, damEarTag: null, liveGrams };
}

type Growing = { today: Day; months: [number, number]; earTag: string; dam: string };

function young(chance: Chance, { today, months, earTag, dam }: Growing): NewAnimal {
  const [least, most] = months;
  const age = chance.between(least, most);
  const isStore = least >= 12;
  return {
    earTag,
    breed: chance.pick(BREEDS),
    sex: chance.pick<Sex>(['steer', 'steer', 'heifer']),
    born: addDays(addMonths(today, -age), -chance.between(0, 27)),
    damEarTag: dam,
    liveGrams: isStore ? (300 + 14 * (age - 12) + chance.between(0, 60)) * 1_000 : null,
  };
}

function finished(plan: KillPlan, { killDay, earTag, dam }: { killDay: Day; earTag: string; dam: string }): NewAnimal {
  const { sex, breed, liveGrams, ageMonths } = plan;
  return { earTag, breed, sex, born: addDays(addMonths(killDay, -ageMonths), -9), damEarTag: dam, liveGrams };
}

/** The medicine book: old entries that have run out, and two beasts that may not be killed yet. */
async function insertMedicines(
  tx: Tx,
  chance: Chance,
  { today, animals }: { today: Day; animals: readonly { id: string; born: Day }[] },
): Promise<void> {
  const grown = animals.filter(({ born }) => born < addMonths(today, -13));
  const old = Array.from({ length: 14 }, () => ({
    animalId: chance.pick(grown).id,
    product: chance.pick(['Fluke drench', 'Pour-on wormer', 'Penicillin injection']),
    givenOn: addDays(today, -chance.between(90, 300)),
    withdrawalDays: chance.pick([28, 35, 49, 56]),
  }));
  const running = grown.slice(-2).map(({ id }, index) => ({
    animalId: id,
    product: 'Penicillin injection',
    givenOn: addDays(today, -3 - index),
    withdrawalDays: 21,
  }));
  await tx.insert(medicineRecord).values([...old, ...running]);
}
