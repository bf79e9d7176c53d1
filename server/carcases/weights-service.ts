import type { Carcase } from '#shared/contracts/carcases.ts';
import { SIDES } from '#shared/engine/cutout/cutout-types.ts';
import { formatKilograms } from '#shared/domain/words.ts';
import { ACCEPTED_GRAMS } from '#shared/engine/cutout/weight-chain.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { enqueue } from '#server/queue.ts';
import { putWeighing, removeWeighings, updateCarcase } from './carcase-queries.ts';
import { getCarcase, getCarcaseRow, loadCarcase, refuseStaleCarcase } from './carcase-service.ts';
import { lockCuttingDay, raiseFigures } from './cutting-day-queries.ts';
import type { CarcaseFigures } from './day-figures.ts';

/** The live weight, which a carcase has before it is one. */
const LIVE = 'live';
const [, MAX_PART_GRAMS] = ACCEPTED_GRAMS.side;

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
    refuseOutOfTime(entry, figures, day?.state === 'closed');
    refuseUnknownPaths(entry, cutouts.specification);
    const live = entry.weights.find(({ path }) => path === LIVE)?.grams ?? null;
    const values = live === null ? {} : { liveGrams: live };
    if (!(await updateCarcase(tx, entry.carcaseId, { version: entry.version, values }))) {
      throw refuseStaleCarcase(entry.version, figures.row.version);
    }
    const measured = entry.weights.filter(({ path }) => path !== LIVE);
    const takenBack = measured.filter((weight) => weight.grams === null).map((weight) => weight.path);
    await removeWeighings(tx, entry.carcaseId, takenBack);
    for (const { path, grams } of measured) {
      if (grams !== null) await putWeighing(tx, { carcaseId: entry.carcaseId, node: path, grams });
    }
    await raiseFigures(tx, cuttingDayId);
    const detail = { weights: entry.weights };
    await recordAudit(tx, { byUserId, action: 'weighed', subject: 'carcase', subjectId: entry.carcaseId, detail });
    await enqueue(tx, 'replan-day', { dayId: cuttingDayId });
    return getCarcase(tx, entry.carcaseId);
  });
}

/** Before the kill only the live weight is known, after it only what hangs: each is weighed in its time. */
function refuseOutOfTime({ weights }: WeightsEntry, { row }: CarcaseFigures, isDayClosed: boolean): void {
  if (isDayClosed) {
    throw new AppError('STATE_CHANGED', 'This cutting day is closed: its weights stay as they are. Nothing was saved.');
  }
  const isLive = weights.some(({ path }) => path === LIVE);
  if (row.state !== 'booked' && isLive) {
    throw new AppError('STATE_CHANGED', 'The kill sheet’s weight counts now, not the live one. Nothing was saved.');
  }
  if (row.state === 'booked' && weights.some(({ path }) => path !== LIVE)) {
    throw new AppError(
      'STATE_CHANGED',
      'There is no kill sheet of this carcase yet. Enter it first; nothing was saved.',
    );
  }
}

/** Known are the live beast, the hung carcase and every part that some way of the specification gives: what was weighed says which way. */
function refuseUnknownPaths(entry: WeightsEntry, specification: Specification): void {
  const known = pathsOf(specification);
  const seen = new Set<string>();
  const fields: FieldErrors = {};
  for (const [index, { path, grams }] of entry.weights.entries()) {
    if (!known.has(path)) fields[`weights.${index}.path`] = 'This carcase has no such part.';
    const sentence = sentenceAboutGrams(path, grams);
    if (sentence) fields[`weights.${index}.grams`] = sentence;
    if (seen.has(path)) fields[`weights.${index}.path`] = 'This part is named twice.';
    seen.add(path);
  }
  if (Object.keys(fields).length > 0) {
    throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', { fields });
  }
}

/** What no scale would show of a beast or a part of it; what does not fit together is the engine's to refuse. */
function sentenceAboutGrams(path: string, grams: number | null): string | null {
  if (grams === null) return path === LIVE ? 'Give the live weight.' : null;
  const [low, high] = path === LIVE ? ACCEPTED_GRAMS.live : path === 'hung' ? ACCEPTED_GRAMS.hung : [0, MAX_PART_GRAMS];
  if (grams >= low && grams <= high) return null;
  return `This weighs between ${formatKilograms(low)} and ${formatKilograms(high)}.`;
}

function pathsOf(specification: Specification): Set<string> {
  const paths = new Set<string>([LIVE, 'hung', ...SIDES]);
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
