import {
  addAllocation,
  listBoxKinds,
  listConfirmedLines,
  listCuts,
  listOffers,
} from '#server/allocation/allocation-queries.ts';
import { publishRow } from '#server/allocation/allocation-service.ts';
import { buildDayInput } from '#server/allocation/day-input.ts';
import { loadDayCutouts } from '#server/carcases/day-figures.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import type { World } from './harness.ts';

const MONEY = {
  ...{ boxPence: 0, loosePence: 0, tradePence: 0, clearancePence: 0 },
  ...{ packagingPence: 0, packingPence: 0, butcheryPence: 0, mincingPence: 0 },
};

/** So many of each box and loose pack on sale, every side cut the first open way; confirmed pieces take their sides in turn. */
function planByHand(input: AllocationInput, each: number): Omit<AllocationPlan, 'lpText'> {
  const units = input.trade.filter((line) => line.kind === 'unit');
  const sideOf = new Map(units.map((line, index) => [line.id, input.sides[index]]));
  return {
    fates: input.sides.flatMap((side) =>
      side.choices.map((choice) => {
        const { id: sideId, carcaseId, side: name } = side;
        const wayId = choice.ways.find((way) => way.closedReason === null)?.wayId ?? null;
        return { sideId, carcaseId, side: name, choiceId: choice.choiceId, wayId, soldPrimals: [] };
      }),
    ),
    boxes: input.boxes.map(({ id, kindId, name }) => {
      return { variantId: id, kindId, name, boxes: each, short: 0, contents: [], incomePence: 0 };
    }),
    loose: input.loose.map(({ cutId }) => ({ cutId, packs: each, grams: 0, short: 0, incomePence: 0 })),
    trade: input.trade.map((line) => {
      const side = sideOf.get(line.id);
      const pieces =
        line.kind === 'unit' && side ? [{ unit: line.unit, sideId: side.id, grams: 0, incomePence: 0 }] : [];
      const cutGrams = line.kind === 'cut' ? line.grams : 0;
      return { lineId: line.id, name: line.name, units: pieces, cutGrams, short: 0, incomePence: 0 };
    }),
    ...{ cuts: [], shortfalls: [], money: MONEY, contributionPence: 0, isProven: true, gap: 0, wholePackPence: 0 },
    ...{ packRounds: [], unfillable: null, milliseconds: 0 },
  };
}

/** Puts a day on sale without asking the solver, for tests of what comes after. */
export async function publishByHand({ db, deps }: World, dayId: string, each = 10): Promise<void> {
  const figures = await loadDayCutouts(db, dayId);
  const input = buildDayInput({
    sides: figures.sides,
    specification: figures.specification,
    cuts: await listCuts(db),
    kinds: await listBoxKinds(db),
    offers: await listOffers(db, dayId),
    reserved: await listConfirmedLines(db, dayId),
    ...{ asked: [], locks: [], stock: [], butcheryTenthPencePerKg: 0, minceClosedReason: null },
  });
  const promise = { boxes: [], loose: [], jointConfidence: 1, safeSharePpht: 100_000, isFloorAtRisk: false };
  const plan = planByHand(input, each);
  await db.transaction(async (tx) => {
    const row = await addAllocation(tx, {
      cuttingDayId: dayId,
      figuresVersion: figures.day.figuresVersion,
      locks: [],
      input: { input, lpText: '', spreads: {} },
      plan: {
        plan,
        weighedCarcaseIds: figures.carcases.map(({ row: carcase }) => carcase.id),
        promise: { ...promise, floorShortfall: null },
        explanation: null,
      },
      contributionPence: 0,
      isProven: true,
    });
    await publishRow(deps, tx, { row, byUserId: null });
  });
}
