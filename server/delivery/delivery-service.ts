import type { Answer } from '#shared/contracts/endpoint.ts';
import type { askDeliverySchema } from '#shared/contracts/delivery-schema.ts';
import type { DeliveryArea, DeliveryAreaEdit } from '#shared/contracts/delivery.ts';
import { londonInstant } from '#shared/domain/day.ts';
import { findArea as findAreaFor, nearestPoint, readPostcode, roundDay } from '#shared/domain/delivery.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { getDayOnSale } from '#server/orders/basket.ts';
import * as queries from './delivery-queries.ts';

type DayOfRound = { id: string; day: string };

/** Whether the van comes to a postcode after a cutting day; if not, where to collect instead. */
export async function askDelivery(
  deps: Deps,
  asked: { dayId: string; postcode: string },
): Promise<Answer<typeof askDeliverySchema>> {
  const day = await getDayOnSale(deps.db, asked.dayId);
  const postcode = readPostcode(asked.postcode);
  const areas = (await queries.listAreas(deps.db)).filter((area) => area.isActive);
  const area = postcode && findAreaFor(areas, postcode);
  if (area) {
    const planned = roundOf(area, day);
    const round = await queries.findRound(deps.db, planned);
    const { name, pricePence, freeFromPence } = area;
    return {
      postcode: asked.postcode,
      area: {
        ...{ name, pricePence, freeFromPence },
        startsAt: planned.startsAt.toISOString(),
        endsAt: planned.endsAt.toISOString(),
        free: roomOf(round, day) ?? area.capacity,
      },
      nearest: null,
    };
  }
  const points = await queries.listPointsOfDay(deps.db, day.id);
  return { postcode: asked.postcode, area: null, nearest: postcode && nearestPoint(points, postcode) };
}

/** Stops left; null before the first one. A round at this very time for another cutting day leaves no room. */
function roomOf(round: queries.RoundRow | null, day: DayOfRound): number | null {
  if (!round) return null;
  return round.cuttingDayId === day.id ? round.capacity - round.taken : 0;
}

function roundOf(area: queries.AreaRow, day: DayOfRound) {
  const on = roundDay(day.day, area.weekday);
  return {
    pointId: area.pointId,
    cuttingDayId: day.id,
    startsAt: londonInstant(on, area.startsAt),
    endsAt: londonInstant(on, area.endsAt),
    capacity: area.capacity,
  };
}

/** The round that brings an order to a postcode, and the area with its price; refused where the van does not come. */
export async function getRound(
  tx: Tx,
  day: DayOfRound,
  address: { postcode: string },
): Promise<{ area: queries.AreaRow; slotId: string }> {
  const postcode = readPostcode(address.postcode);
  const areas = (await queries.listAreas(tx)).filter((area) => area.isActive);
  const area = postcode && findAreaFor(areas, postcode);
  if (!area) {
    const nearest = postcode && nearestPoint(await queries.listPointsOfDay(tx, day.id), postcode);
    const instead = nearest ? ` You can collect it from ${nearest.name}, ${nearest.addressLines.join(', ')}.` : '';
    throw new AppError(
      'INVALID_INPUT',
      `The van does not come to ${address.postcode}.${instead} Nothing was taken and nothing was charged.`,
      { fields: { postcode: `The van does not come here.${instead}` } },
    );
  }
  const round = await queries.ensureRound(tx, roundOf(area, day));
  return { area, slotId: round.id };
}

export async function listDeliveryAreas(deps: Deps): Promise<{ areas: DeliveryArea[] }> {
  return { areas: (await queries.listAreas(deps.db)).map(describe) };
}

function describe(row: queries.AreaRow): DeliveryArea {
  const { createdAt: _createdAt, pointId: _pointId, ...area } = row;
  return area;
}

export async function addDeliveryArea(deps: Deps, byUserId: string, area: DeliveryAreaEdit): Promise<DeliveryArea> {
  return deps.db.transaction(async (tx) => {
    await refuseOverlap(tx, area, null);
    const row = await queries.insertArea(tx, area);
    await recordAudit(tx, { byUserId, action: 'added', subject: 'delivery area', subjectId: row.id, detail: area });
    return describe(row);
  });
}

type AreaEdit = { areaId: string; version: number; area: DeliveryAreaEdit };

/** Rounds that are on their way keep their day, time and room. */
export async function editDeliveryArea(deps: Deps, byUserId: string, edit: AreaEdit): Promise<DeliveryArea> {
  return deps.db.transaction(async (tx) => {
    const before = await queries.findArea(tx, edit.areaId);
    if (!before) throw new AppError('NOT_FOUND', 'There is no such delivery area.');
    await refuseOverlap(tx, edit.area, edit.areaId);
    const row = await queries.updateArea(tx, edit);
    if (!row) {
      throw new AppError(
        'STATE_CHANGED',
        'Somebody else changed this area while you were editing it. Nothing of yours was saved; look at it again.',
      );
    }
    const detail = { from: describe(before), to: edit.area };
    await recordAudit(tx, { byUserId, action: 'edited', subject: 'delivery area', subjectId: row.id, detail });
    return describe(row);
  });
}

/** One postcode, one area: which of two prices counts must never be a matter of chance. */
async function refuseOverlap(tx: Tx, area: DeliveryAreaEdit, ownId: string | null): Promise<void> {
  const others = (await queries.listAreas(tx)).filter((other) => other.id !== ownId);
  const twice = area.prefixes.find((prefix) => others.some((other) => other.prefixes.includes(prefix)));
  if (!twice) return;
  const words = `${twice} belongs to another area already.`;
  throw new AppError('INVALID_INPUT', `${words} Nothing was saved.`, { fields: { prefixes: words } });
}
