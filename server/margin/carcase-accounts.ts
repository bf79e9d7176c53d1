import type { Deadweight } from '#shared/contracts/margin.ts';
import type { Settings } from '#shared/contracts/office.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { deadweightValue } from '#shared/engine/margin/deadweight-value.ts';
import type { CardFee } from '#shared/engine/margin/margin-types.ts';
import type { CarcaseAccount } from '#shared/engine/margin/share-carcases.ts';
import type { CarcaseFigures, DayCutouts } from '#server/carcases/day-figures.ts';
import type { Db, Tx } from '#server/deps.ts';
import { readSettings } from '#server/farm/farm-settings.ts';
import { readPriceGrid, type GridInForce } from './price-grid-service.ts';

/** One carcase of a day: what it costs before it is cut, and what it would have brought deadweight. */
export type CarcaseMoney = Omit<CarcaseAccount, 'costs'> & {
  costs: Pick<Required<CarcaseAccount['costs']>, 'killPence' | 'inspectionPence' | 'levyPence' | 'haulagePence'>;
  /** Null where the grid has no price for the class; the deadweight value is then nought. */
  deadweight: Deadweight | null;
  problem: string | null;
};

export type DayMoney = { carcases: CarcaseMoney[]; cardFee: CardFee; grid: GridInForce };

/** Prices and costs of a day's carcases, each by the grid in force on its day of kill. */
export async function readDayMoney(db: Db | Tx, figures: DayCutouts): Promise<DayMoney> {
  const settings = await readSettings(db, figures.day.day);
  const { reference } = figures.specification;
  const carcases: CarcaseMoney[] = [];
  let grid = await readPriceGrid(db, figures.day.day);
  for (const carcase of figures.carcases) {
    grid = await readPriceGrid(db, carcase.row.killDay);
    carcases.push(priceCarcase(carcase, { grid, settings, reference }));
  }
  return { carcases, cardFee: { ratePpht: settings.cardRatePpht, fixedPence: settings.cardFixedPence }, grid };
}

type Prices = {
  grid: GridInForce;
  settings: Settings;
  reference: { conformation: string; fatClass: string };
};

function priceCarcase({ row, facts, cutout }: CarcaseFigures, { grid, settings, reference }: Prices): CarcaseMoney {
  const coldGrams = cutout.cold.grams;
  const isGraded = row.conformation !== null && row.fatClass !== null;
  const conformation = row.conformation ?? reference.conformation;
  const fatClass = row.fatClass ?? reference.fatClass;
  const { killPence, inspectionPence, levyPence, haulagePence } = settings;
  const account = { carcaseId: row.id, coldGrams, costs: { killPence, inspectionPence, levyPence, haulagePence } };
  const { baseTenthPencePerKg, levyPence: gridLevy, haulagePence: gridHaulage, deductionsPence } = grid;
  const deductions = { levyPence: gridLevy, haulagePence: gridHaulage, deductionsPence };
  try {
    const { deductedPence: _deducted, ...value } = deadweightValue({
      ...{ coldGrams, conformation, fatClass, baseTenthPencePerKg, ...deductions },
      grid: grid.grid,
      bornDay: facts.bornDay,
      killDay: facts.killDay,
    });
    const deadweight = { coldGrams, conformation, fatClass, isGraded, baseTenthPencePerKg, ...deductions, ...value };
    return { ...account, deadweightPence: value.netPence, deadweight, problem: null };
  } catch (error) {
    if (!(error instanceof EngineError) || error.code !== 'CLASS_UNKNOWN') throw error;
    return { ...account, deadweightPence: 0, deadweight: null, problem: error.message };
  }
}
