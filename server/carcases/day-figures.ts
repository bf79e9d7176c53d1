import { daysBetween } from '#shared/domain/day.ts';
import { cutout } from '#shared/engine/cutout/cutout.ts';
import type {
  CarcaseFacts,
  ChosenWays,
  Cutout,
  SideName,
  SideSupply,
  VertebraeRule,
} from '#shared/engine/cutout/cutout-types.ts';
import { Specification } from '#shared/engine/figures/specification.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Tx } from '#server/deps.ts';
import { readVertebraeRule } from '#server/farm/farm-settings.ts';
import { listCarcasesOfDays, listWeighings, type CarcaseOfDay } from './carcase-queries.ts';
import { findDay, findSpecification, type DayWithSpecification } from './cutting-day-queries.ts';

/** Ways chosen, by carcase id and side. A choice without an entry takes its first open way. */
export type WaysByCarcase = Readonly<Record<string, Readonly<Record<SideName, ChosenWays>>>>;

export type CarcaseFigures = { row: CarcaseOfDay; facts: CarcaseFacts; rule: VertebraeRule; cutout: Cutout };

/** All that is known of a day's beef: `figuresVersion` of `day` names it. */
export type DayCutouts = {
  day: DayWithSpecification;
  specification: Specification;
  carcases: CarcaseFigures[];
  /** Every side of every carcase with what each way would give: the supply of the allocation. */
  sides: SideSupply[];
};

const DEFAULT_WAYS = { left: {}, right: {} };

export async function loadDayCutouts(db: Db | Tx, dayId: string, ways: WaysByCarcase = {}): Promise<DayCutouts> {
  const day = await findDay(db, dayId);
  if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
  const specification = await readSpecification(db, day.specificationId);
  const rows = await listCarcasesOfDays(db, [dayId]);
  const weighings = await listWeighings(
    db,
    rows.map((row) => row.id),
  );
  const carcases: CarcaseFigures[] = [];
  for (const row of rows) {
    const rule = await readVertebraeRule(db, row.killDay);
    const facts = factsOf(row, weighings.get(row.id) ?? {});
    const figures = cutout({ carcase: facts, specification, rule, ways: ways[row.id] ?? DEFAULT_WAYS });
    carcases.push({ row, facts, rule, cutout: figures });
  }
  return { day, specification, carcases, sides: carcases.flatMap((carcase) => carcase.cutout.sides) };
}

/** The copy that a cutting day names. It was checked when it was saved. */
export async function readSpecification(db: Db | Tx, specificationId: string): Promise<Specification> {
  const row = await findSpecification(db, specificationId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such cutting specification.');
  return Specification.parse(row.body);
}

/** What the engine is told of a carcase: the kill sheet and the scales where there are some, the live weight before. */
export function factsOf(row: CarcaseOfDay, measured: Readonly<Record<string, number>>): CarcaseFacts {
  return {
    id: row.id,
    type: row.animal.sex,
    bornDay: row.animal.born,
    killDay: row.killDay,
    liveGrams: row.liveGrams,
    hotGrams: row.hotGrams,
    coldGrams: row.coldGrams,
    sideGrams:
      row.leftGrams === null || row.rightGrams === null ? null : { left: row.leftGrams, right: row.rightGrams },
    killingOutPpht: null,
    conformation: row.conformation,
    fatClass: row.fatClass,
    hanging: { method: row.hanging, days: Math.max(0, daysBetween(row.killDay, row.day)) },
    measured,
  };
}
