import type { Answer } from '#shared/contracts/endpoint.ts';
import type { PriceGrid, PriceGridEdit } from '#shared/contracts/margin.ts';
import type { getPriceGridsSchema } from '#shared/contracts/margin-schema.ts';
import type { Day } from '#shared/domain/day.ts';
import { britishGrid } from '#shared/engine/figures/price-grids.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { findPriceGrid, insertPriceGrid, listPriceGrids, type PriceGridRow } from './price-grid-queries.ts';

/** What the same carcase would be paid for, as it stands on one day. */
export type GridInForce = Pick<
  PriceGridRow,
  'edition' | 'validFrom' | 'baseTenthPencePerKg' | 'grid' | 'levyPence' | 'haulagePence' | 'deductionsPence'
>;

/**
 * Holds until the farm saves its own. Base: R4L steers in Great Britain, week ending 15 March 2025, 675 p a kg cold, as the
 * levy board printed it. Levy: the producer's part for cattle in England from April 2024. Haulage and deductions are common
 * practice.
 */
const START: GridInForce = {
  edition: 0,
  validFrom: '2025-03-15',
  baseTenthPencePerKg: 6_750,
  grid: {
    ...britishGrid,
    source: `Base: R4L steers, week ending 15 March 2025. Adjustments: ${britishGrid.source}`,
  },
  levyPence: 506,
  haulagePence: 2_500,
  deductionsPence: 1_200,
};

export async function readPriceGrid(db: Db | Tx, on: Day): Promise<GridInForce> {
  return (await findPriceGrid(db, on)) ?? START;
}

export async function getPriceGrids({ db, clock }: Deps): Promise<Answer<typeof getPriceGridsSchema>> {
  const rows = await listPriceGrids(db);
  return {
    latestEdition: rows[0]?.edition ?? START.edition,
    current: describeGrid(await readPriceGrid(db, clock.today())),
    editions: [...rows, START].map(({ edition, grid, validFrom, baseTenthPencePerKg }) => ({
      edition,
      name: grid.name,
      validFrom,
      baseTenthPencePerKg,
    })),
  };
}

/** Keeps the grid as a new edition. Refuses with STATE_CHANGED when the editor has not seen the newest one. */
export async function savePriceGrid(deps: Deps, byUserId: string, edit: PriceGridEdit): Promise<PriceGrid> {
  return deps.db.transaction(async (tx) => {
    const [newest] = await listPriceGrids(tx);
    const row =
      (newest?.edition ?? START.edition) === edit.edition
        ? await insertPriceGrid(tx, { ...rowOf(edit), edition: edit.edition + 1, byUserId })
        : null;
    if (!row) {
      throw new AppError('STATE_CHANGED', 'Somebody else has saved the price grid since you opened it.');
    }
    const detail = { edition: row.edition, validFrom: row.validFrom, baseTenthPencePerKg: row.baseTenthPencePerKg };
    await recordAudit(tx, { byUserId, action: 'saved', subject: 'price grid', subjectId: row.id, detail });
    return describeGrid(row);
  });
}

function rowOf({ name, source, conformations, rows, weightSteps, ageSteps, ...columns }: PriceGridEdit) {
  const adjustments = Object.fromEntries(
    rows.map((row) => [
      row.fatClass,
      Object.fromEntries(conformations.map((conformation, at) => [conformation, row.adjustments[at] ?? 0])),
    ]),
  );
  const fatClasses = rows.map(({ fatClass }) => fatClass);
  return { ...columns, grid: { name, source, conformations, fatClasses, adjustments, weightSteps, ageSteps } };
}

function describeGrid({ grid, ...row }: GridInForce): PriceGrid {
  const { edition, validFrom, baseTenthPencePerKg, levyPence, haulagePence, deductionsPence } = row;
  return {
    ...{ edition, validFrom, baseTenthPencePerKg, levyPence, haulagePence, deductionsPence },
    name: grid.name,
    source: grid.source,
    conformations: [...grid.conformations],
    rows: grid.fatClasses.map((fatClass) => ({
      fatClass,
      adjustments: grid.conformations.map((conformation) => grid.adjustments[fatClass]?.[conformation] ?? 0),
    })),
    weightSteps: [...grid.weightSteps],
    ageSteps: [...grid.ageSteps],
  };
}
