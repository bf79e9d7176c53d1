import type { Carcase } from '#shared/contracts/carcases.ts';
import { SIDES } from '#shared/engine/cutout/cutout-types.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { enqueue } from '#server/queue.ts';
import { putWeighing, removeWeighings, updateCarcase } from './carcase-queries.ts';
import { getCarcase, getCarcaseRow, loadCarcase, refuseStaleCarcase } from './carcase-service.ts';
import { lockCuttingDay, raiseFigures } from './cutting-day-queries.ts';
import type { CarcaseFigures } from './day-figures.ts';

export type WeightsEntry = {
  carcaseId: string;
  version: number;
  weights: { path: string; grams: number | null }[];
};

/**
 * Measured weights replace estimates, each at its own level. The engine refuses a set that differs from what was weighed
 * above it by more than half a per cent, and with that refusal nothing of the set is kept.
 */
export async function enterWeights(deps: Deps, byUserId: string, entry: WeightsEntry): Promise<Carcase> {
  return deps.db.transaction(async (tx) => {
    const { cuttingDayId } = await getCarcaseRow(tx, entry.carcaseId);
    const day = await lockCuttingDay(tx, cuttingDayId);
    const { day: cutouts, figures } = await loadCarcase(tx, entry.carcaseId);
    refuseBeforeKillOrAfterClose(figures, day?.state === 'closed');
    refuseUnknownPaths(entry, cutouts.specification);
    if (!(await updateCarcase(tx, entry.carcaseId, { version: entry.version, values: {} }))) {
      throw refuseStaleCarcase(entry.version, figures.row.version);
    }
    const takenBack = entry.weights.filter((weight) => weight.grams === null).map((weight) => weight.path);
    await removeWeighings(tx, entry.carcaseId, takenBack);
    for (const { path, grams } of entry.weights) {
      if (grams !== null) await putWeighing(tx, { carcaseId: entry.carcaseId, node: path, grams });
    }
    await raiseFigures(tx, cuttingDayId);
    const detail = { weights: entry.weights };
    await recordAudit(tx, { byUserId, action: 'weighed', subject: 'carcase', subjectId: entry.carcaseId, detail });
    await enqueue(tx, 'replan-day', { dayId: cuttingDayId });
    return getCarcase(tx, entry.carcaseId);
  });
}

function refuseBeforeKillOrAfterClose({ row }: CarcaseFigures, isDayClosed: boolean): void {
  if (isDayClosed) {
    throw new AppError('STATE_CHANGED', 'This cutting day is closed: its weights stay as they are. Nothing was saved.');
  }
  if (row.state === 'booked') {
    throw new AppError(
      'STATE_CHANGED',
      'There is no kill sheet of this carcase yet. Enter it first; nothing was saved.',
    );
  }
}

/** Known are the hung carcase and every part that some way of the specification gives: what was weighed says which way. */
function refuseUnknownPaths(entry: WeightsEntry, specification: Specification): void {
  const known = pathsOf(specification);
  const seen = new Set<string>();
  const fields: FieldErrors = {};
  for (const [index, { path }] of entry.weights.entries()) {
    if (!known.has(path)) fields[`weights.${index}.path`] = 'This carcase has no such part.';
    if (seen.has(path)) fields[`weights.${index}.path`] = 'This part is named twice.';
    seen.add(path);
  }
  if (Object.keys(fields).length > 0) {
    throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', { fields });
  }
}

function pathsOf(specification: Specification): Set<string> {
  const paths = new Set<string>(['hung', ...SIDES]);
  for (const side of SIDES) {
    for (const quarter of specification.quarters) {
      paths.add(`${side}/${quarter.id}`);
      for (const primal of quarter.primals) {
        const at = `${side}/${quarter.id}/${primal.id}`;
        paths.add(at);
        for (const lineId of linesOf(specification, primal.id)) paths.add(`${at}/${lineId}`);
      }
    }
  }
  return paths;
}

function linesOf(specification: Specification, primalId: string): string[] {
  const lines = specification.choices.flatMap((choice) => choice.ways.flatMap((way) => way.lines));
  return lines.filter((line) => line.takes.some((take) => take.primalId === primalId)).map((line) => line.id);
}
