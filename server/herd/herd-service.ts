import type { Animal, NewAnimal } from '#shared/contracts/herd.ts';
import { ageInMonths, type Day } from '#shared/domain/day.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatDayWithYear } from '#shared/domain/words.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { groupBy } from '#server/farm/group-by.ts';
import {
  findAnimal,
  findAnimalByEarTag,
  insertAnimal,
  insertMedicine,
  listAnimalCarcases,
  listAnimalRows,
  listMedicines,
  lockAnimal,
  updateAnimal,
  type AnimalRow,
} from './herd-queries.ts';
import { withdrawalClearDay } from './withdrawal.ts';

type Recorded = { product: string; givenOn: Day; withdrawalDays: number };

export async function listHerd(deps: Deps): Promise<Animal[]> {
  return describeAnimals(deps.db, await listAnimalRows(deps.db), deps.clock.today());
}

export async function addAnimal(deps: Deps, byUserId: string, values: NewAnimal): Promise<Animal> {
  refuseFields(fieldsOfAnimal(values, deps.clock.today()));
  return deps.db.transaction(async (tx) => {
    const row = await insertAnimal(tx, values);
    if (!row) throw earTagKnown(values.earTag);
    await recordAudit(tx, { byUserId, action: 'added', subject: 'animal', subjectId: row.id, detail: { ...values } });
    return describeAnimal(tx, row, deps.clock.today());
  });
}

export async function editAnimal(
  deps: Deps,
  byUserId: string,
  edit: { animalId: string; version: number; values: NewAnimal },
): Promise<Animal> {
  const today = deps.clock.today();
  refuseFields(fieldsOfAnimal(edit.values, today));
  return deps.db.transaction(async (tx) => {
    const before = await lockAnimal(tx, edit.animalId);
    if (!before) throw animalMissing();
    const namesake = await findAnimalByEarTag(tx, edit.values.earTag);
    if (namesake && namesake.id !== edit.animalId) throw earTagKnown(edit.values.earTag);
    if (!(await updateAnimal(tx, edit.animalId, edit))) {
      throw new AppError(
        'STATE_CHANGED',
        'Somebody else changed this animal while you were editing it. Nothing of yours was saved; look at it again.',
        { figures: { yourVersion: edit.version, presentVersion: before.version } },
      );
    }
    await refuseChangedFactsOfKilled(tx, before, edit.values);
    const detail = { from: before, to: edit.values };
    await recordAudit(tx, { byUserId, action: 'edited', subject: 'animal', subjectId: edit.animalId, detail });
    return getAnimal(tx, edit.animalId, today);
  });
}

export async function recordMedicine(
  deps: Deps,
  byUserId: string,
  dose: Recorded & { animalId: string },
): Promise<Animal> {
  const today = deps.clock.today();
  return deps.db.transaction(async (tx) => {
    const row = await lockAnimal(tx, dose.animalId);
    if (!row) throw animalMissing();
    refuseFields(await fieldsOfDose(tx, row, { ...dose, today }));
    await insertMedicine(tx, dose);
    const detail = { product: dose.product, givenOn: dose.givenOn, withdrawalDays: dose.withdrawalDays };
    await recordAudit(tx, { byUserId, action: 'medicine', subject: 'animal', subjectId: row.id, detail });
    return describeAnimal(tx, row, today);
  });
}

async function fieldsOfDose(tx: Tx, row: AnimalRow, dose: Recorded & { today: Day }): Promise<FieldErrors> {
  if (dose.givenOn > dose.today) return { givenOn: 'This day is still to come.' };
  if (dose.givenOn < row.born) return { givenOn: `The animal was born on ${formatDayWithYear(row.born)}.` };
  const [booked] = await listAnimalCarcases(tx, [row.id]);
  const clear = withdrawalClearDay([dose]);
  if (booked && dose.givenOn > booked.killDay) {
    return { givenOn: `The kill of this animal is entered for ${formatDayWithYear(booked.killDay)}.` };
  }
  if (booked && clear && booked.killDay < clear) {
    const until = formatDayWithYear(clear);
    return {
      withdrawalDays: `This animal is booked for kill on ${formatDayWithYear(booked.killDay)}, inside this withdrawal period: it may be killed from ${until} on. Speak to your vet and move the booking first.`,
    };
  }
  return {};
}

/** What the kill sheet rests on stays as it was: the carcase's figures are worked from it. */
async function refuseChangedFactsOfKilled(tx: Tx, before: AnimalRow, values: NewAnimal): Promise<void> {
  const isSame = before.born === values.born && before.sex === values.sex && before.earTag === values.earTag;
  if (isSame) return;
  const [booked] = await listAnimalCarcases(tx, [before.id]);
  if (!booked) return;
  throw new AppError(
    'STATE_CHANGED',
    `This animal is booked for kill on ${formatDayWithYear(booked.killDay)}: its ear tag, sex and birth date stay as they are. Nothing was saved.`,
  );
}

function fieldsOfAnimal(values: NewAnimal, today: Day): FieldErrors {
  const fields: FieldErrors = {};
  if (values.born > today) fields.born = 'This day is still to come.';
  if (values.damEarTag === values.earTag) fields.damEarTag = 'An animal is not its own dam.';
  return fields;
}

function refuseFields(fields: FieldErrors): void {
  if (Object.keys(fields).length === 0) return;
  throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', { fields });
}

function earTagKnown(earTag: string): AppError {
  const sentence = `${formatEarTag(earTag)} is in the herd already.`;
  return new AppError('ALREADY_KNOWN', `${sentence} Nothing was saved.`, { fields: { earTag: sentence } });
}

function animalMissing(): AppError {
  return new AppError('NOT_FOUND', 'There is no such animal in the herd.');
}

async function getAnimal(db: Db | Tx, animalId: string, today: Day): Promise<Animal> {
  const row = await findAnimal(db, animalId);
  if (!row) throw animalMissing();
  return describeAnimal(db, row, today);
}

async function describeAnimal(db: Db | Tx, row: AnimalRow, today: Day): Promise<Animal> {
  const [animal] = await describeAnimals(db, [row], today);
  if (!animal) throw animalMissing();
  return animal;
}

async function describeAnimals(db: Db | Tx, rows: readonly AnimalRow[], today: Day): Promise<Animal[]> {
  if (rows.length === 0) return [];
  const ids = rows.map((row) => row.id);
  const medicines = groupBy(await listMedicines(db, ids), (dose) => dose.animalId);
  const carcases = new Map((await listAnimalCarcases(db, ids)).map((carcase) => [carcase.animalId, carcase]));
  return rows.map((row) => {
    const doses = medicines.get(row.id) ?? [];
    const carcase = carcases.get(row.id);
    return {
      id: row.id,
      earTag: row.earTag,
      breed: row.breed,
      sex: row.sex,
      born: row.born,
      damEarTag: row.damEarTag,
      liveGrams: row.liveGrams,
      ageMonths: ageInMonths(row.born, carcase && carcase.killDay < today ? carcase.killDay : today),
      version: row.version,
      withdrawalClearDay: withdrawalClearDay(doses),
      medicines: doses.map(({ id, product, givenOn, withdrawalDays }) => ({ id, product, givenOn, withdrawalDays })),
      carcase: carcase
        ? {
            id: carcase.id,
            state: carcase.state,
            killDay: carcase.killDay,
            cuttingDayId: carcase.cuttingDayId,
          }
        : null,
    };
  });
}
