import type { PriceGrid, PriceGridEdit } from '#shared/contracts/margin.ts';
import type { PriceGrid as EngineGrid } from '#shared/engine/margin/margin-types.ts';
import { formatMoney } from '#shared/domain/words.ts';

/** `+ £0.15`, `− £0.40`, `£0.00`: tenths of a penny per kg on or off the base. */
export function signedRate(tenthPence: number): string {
  if (tenthPence === 0) return formatMoney(0);
  return `${tenthPence > 0 ? '+' : '−'} ${formatMoney(Math.round(Math.abs(tenthPence) / 10))}`;
}

/** The widest and the narrowest price of a row: `+ £0.15 to − £0.65`. */
export function spanOfRow(adjustments: readonly number[]): string {
  const known = adjustments.filter((each) => Number.isFinite(each));
  if (known.length === 0) return 'no price yet';
  const [most, least] = [Math.max(...known), Math.min(...known)];
  return most === least ? signedRate(most) : `${signedRate(most)} to ${signedRate(least)}`;
}

/** The grid as a form edits it; `edition` is the newest one that the editor has seen. */
export function startEdit({ edition: _inForce, ...grid }: PriceGrid, latestEdition: number): PriceGridEdit {
  return { ...grid, edition: latestEdition };
}

/** Classes, adjustments and steps of a published grid; what is the farm's own stays. */
export function takeOver(
  grid: EngineGrid,
): Pick<PriceGridEdit, 'name' | 'source' | 'conformations' | 'rows' | 'weightSteps' | 'ageSteps'> {
  return {
    name: grid.name,
    source: grid.source,
    conformations: [...grid.conformations],
    rows: grid.fatClasses.map((fatClass) => ({
      fatClass,
      adjustments: grid.conformations.map((conformation) => grid.adjustments[fatClass]?.[conformation] ?? 0),
    })),
    weightSteps: grid.weightSteps.map((step) => ({ ...step })),
    ageSteps: grid.ageSteps.map((step) => ({ ...step })),
  };
}

/** The grid with one more class of conformation, priced as its neighbour. */
export function addConformation(grid: Pick<PriceGridEdit, 'conformations' | 'rows'>, name: string) {
  return {
    conformations: [...grid.conformations, name],
    rows: grid.rows.map((row) => ({ ...row, adjustments: [...row.adjustments, row.adjustments.at(-1) ?? 0] })),
  };
}

/** The grid with one more fat class, priced as its neighbour. */
export function addFatClass(grid: Pick<PriceGridEdit, 'conformations' | 'rows'>, name: string) {
  const like = grid.rows.at(-1)?.adjustments ?? grid.conformations.map(() => 0);
  return { conformations: [...grid.conformations], rows: [...grid.rows, { fatClass: name, adjustments: [...like] }] };
}
