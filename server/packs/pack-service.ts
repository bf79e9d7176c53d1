import { randomBytes } from 'node:crypto';
import type { Pack, PackingDay } from '#shared/contracts/packs.ts';
import { addDays } from '#shared/domain/day.ts';
import { AppError } from '#shared/errors.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import { loadDayCutouts } from '#server/carcases/day-figures.ts';
import { recordMovements, type Place } from '#server/carcases/ledger-queries.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { enterLedger, refuseTooMuch } from './carcase-ledger.ts';
import {
  endAssignments,
  findDayOfUse,
  findPack,
  insertPacks,
  markCut,
  moveOrder,
  readCut,
  readPlaces,
  setPackGrams,
  type PackRow,
} from './pack-queries.ts';
import { describeFill } from './fill-work.ts';
import { describePack, loadWork, noSuchPack, readPackingDay } from './packing-day.ts';
import { settleWeights } from './settle-weights.ts';

export type NewPacks = { dayId: string; carcaseId: string; cutId: string; grams: number[] };

/** Weighs packs into the chiller: codes, dates and the ledger's movements in one transaction. */
export async function addPacks(deps: Deps, byUserId: string, wanted: NewPacks): Promise<PackingDay> {
  return deps.db.transaction(async (tx) => {
    await lockOpenDay(tx, wanted.dayId);
    const { carcases, specification } = await loadDayCutouts(tx, wanted.dayId);
    const carcase = carcases.find(({ row }) => row.id === wanted.carcaseId);
    if (!carcase) throw refuseField('carcaseId', 'This carcase does not belong to this cutting day.');
    if (carcase.row.state === 'booked') throw refuseField('carcaseId', 'This animal has no kill sheet yet.');
    const cut = await readCut(tx, wanted.cutId);
    if (!cut || !specification.cuts.some((each) => each.id === cut.id)) {
      throw refuseField('cutId', 'The specification of this day does not make this cut.');
    }
    await enterLedger(tx, carcase, byUserId);
    await refuseTooMuch(tx, carcase, sum(wanted.grams));
    const packedOn = deps.clock.today();
    const { carcaseId, cutId } = wanted;
    const shared = { cuttingDayId: wanted.dayId, carcaseId, cutId, packedOn, useBy: addDays(packedOn, cut.useByDays) };
    const packs = await insertPacks(
      tx,
      wanted.grams.map((grams) => ({ ...shared, grams, code: makePackCode() })),
    );
    await recordMovements(
      tx,
      packs.map(({ id, grams }) => ({
        carcaseId,
        packId: id,
        fromPlace: 'carcase' as const,
        toPlace: 'chiller' as const,
        grams,
        reason: 'packed',
        byUserId,
      })),
    );
    await markCut(tx, carcaseId);
    return readPackingDay(tx, wanted.dayId);
  });
}

function sum(grams: readonly number[]): number {
  return grams.reduce((total, each) => total + each, 0);
}

/** Ten characters of an alphabet without look-alikes: 50 bits, too many to guess a pack's page. */
function makePackCode(): string {
  const alphabet = '23456789ABCDEFGHJKLMNPQRSTUVWXYZ';
  return Array.from(randomBytes(10), (byte) => alphabet[byte % alphabet.length]).join('');
}

function refuseField(field: string, sentence: string): AppError {
  return new AppError('INVALID_INPUT', 'Nothing was weighed in.', { fields: { [field]: sentence } });
}

async function lockOpenDay(tx: Tx, dayId: string): Promise<void> {
  const day = await lockCuttingDay(tx, dayId);
  if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
  if (day.state === 'closed') throw new AppError('STATE_CHANGED', 'This cutting day is closed. Nothing was changed.');
}

type Correction = { pack: PackRow; place: Place; grams: number; lastMovementId: string; byUserId: string };

/** A weight put right is two movements: what was booked goes back to the carcase, what is true comes out of it. */
async function correctLedger(tx: Tx, { pack, place, grams, lastMovementId, byUserId }: Correction): Promise<void> {
  const { carcaseId, id: packId } = pack;
  const back = { carcaseId, packId, fromPlace: place, toPlace: 'carcase' as const, byUserId };
  await recordMovements(tx, [{ ...back, grams: pack.grams, reason: 'weighed again', reversalOf: lastMovementId }]);
  const out = { carcaseId, packId, fromPlace: 'carcase' as const, toPlace: place, byUserId };
  await recordMovements(tx, [{ ...out, grams, reason: 'weighed again' }]);
}

export type Reweighing = { packId: string; grams: number };

/** A pack that lies in an order stays there. If its box no longer fits, the order is open again and the next fill mends it. */
export async function reweighPack(deps: Deps, byUserId: string, { packId, grams }: Reweighing): Promise<Pack> {
  return deps.db.transaction(async (tx) => {
    const { pack, place, lastMovementId, dayId } = await lockPack(tx, packId);
    if (dayId !== pack.cuttingDayId) {
      throw new AppError('STATE_CHANGED', `Pack ${pack.code} is frozen and keeps the weight on its label.`);
    }
    await correctLedger(tx, { pack, place, grams, lastMovementId, byUserId });
    await setPackGrams(tx, packId, grams);
    const detail = { from: pack.grams, to: grams };
    await recordAudit(tx, { byUserId, action: 'weighed again', subject: 'pack', subjectId: packId, detail });
    const { jobs, packs } = await loadWork(tx, pack.cuttingDayId);
    const row = packs.find((candidate) => candidate.id === packId);
    if (!row) throw noSuchPack();
    const job = jobs.find((candidate) => candidate.packs.some((each) => each.id === packId));
    if (job?.orderId && job.isPacked && !job.isDone) {
      if (!describeFill(job).isFilled) await moveOrder(tx, job.orderId, { from: 'packed', to: 'confirmed' });
      else await settleWeights(deps, tx, { orderId: job.orderId, jobs });
    }
    return describePack(row, jobs);
  });
}

const GONE: readonly Place[] = ['waste', 'own use', 'trade', 'carcase'];

async function lockPack(tx: Tx, packId: string) {
  const known = await findPack(tx, packId);
  if (!known) throw noSuchPack();
  // A frozen pack is worked with on the day whose order it lies in; its own is long closed.
  const dayId = (await findDayOfUse(tx, packId)) ?? known.cuttingDayId;
  await lockOpenDay(tx, dayId);
  const pack = await findPack(tx, packId);
  const last = (await readPlaces(tx, [packId])).get(packId);
  if (!pack || !last) throw noSuchPack();
  if (GONE.includes(last.place)) {
    throw new AppError('STATE_CHANGED', `Pack ${pack.code} has been booked out already. Nothing was changed.`);
  }
  return { pack, place: last.place, lastMovementId: last.id, dayId };
}

export type Loss = { packId: string; reason: 'dropped' | 'torn' | 'weighed twice' | 'own use' };

/** A pack that was weighed twice never was: its grams are still in the carcase. */
const DESTINATION: Record<Loss['reason'], Place> = {
  dropped: 'waste',
  torn: 'waste',
  'own use': 'own use',
  'weighed twice': 'carcase',
};

/** Books a pack out. The order that it lay in is open again until the next fill. */
export async function losePack(deps: Deps, byUserId: string, { packId, reason }: Loss): Promise<PackingDay> {
  return deps.db.transaction(async (tx) => {
    const { pack, place, dayId } = await lockPack(tx, packId);
    const { jobs } = await loadWork(tx, dayId);
    const job = jobs.find((candidate) => candidate.packs.some((each) => each.id === packId));
    if (job?.isDone) {
      throw new AppError('STATE_CHANGED', `Pack ${pack.code} lies in an order that is ready. Nothing was changed.`);
    }
    await endAssignments(tx, [packId]);
    if (job?.orderId) await moveOrder(tx, job.orderId, { from: 'packed', to: 'confirmed' });
    const { carcaseId, grams } = pack;
    const toPlace = DESTINATION[reason];
    await recordMovements(tx, [{ carcaseId, packId, fromPlace: place, toPlace, grams, reason, byUserId }]);
    await recordAudit(tx, { byUserId, action: 'booked out', subject: 'pack', subjectId: packId, detail: { reason } });
    return readPackingDay(tx, dayId);
  });
}
