import type { Settings } from '#shared/contracts/office.ts';
import type { AllocationQuestion } from '#shared/domain/allocation-record.ts';
import type { StockItem, WayLock } from '#shared/engine/allocation/allocation-input.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { judgeMince, type MinceVerdict } from '#shared/domain/mince-age.ts';
import { defaultSpread, WEIGHED_SPREAD } from '#shared/engine/promise/spread.ts';
import type { Spread } from '#shared/engine/promise/promise-types.ts';
import { AppError } from '#shared/errors.ts';
import { loadDayCutouts, type DayCutouts } from '#server/carcases/day-figures.ts';
import type { Db, Tx } from '#server/deps.ts';
import { readSettings } from '#server/farm/farm-settings.ts';
import {
  listBoxKinds,
  listConfirmedLines,
  listCuts,
  listOffers,
  type BoxKindRow,
  type CutRow,
  type OfferRow,
  type ReservedLine,
} from './allocation-queries.ts';
import { buildDayInput } from './day-input.ts';
import { readFrozenStock } from './frozen-stock.ts';

/** All that a day's question is made of, as it stands now. */
export type DayFacts = {
  figures: DayCutouts;
  settings: Settings;
  cuts: CutRow[];
  kinds: BoxKindRow[];
  offers: OfferRow[];
  reserved: ReservedLine[];
  /** Out of the freezer, from earlier days. */
  stock: StockItem[];
};

/** Refuses a day that is closed, and with NOT_FILLABLE one that has no carcase. */
export async function loadDayFacts(db: Db | Tx, dayId: string): Promise<DayFacts> {
  const figures = await loadDayCutouts(db, dayId);
  if (figures.day.state === 'closed') {
    throw new AppError('STATE_CHANGED', 'This cutting day is closed. Nothing was changed.');
  }
  if (figures.carcases.length === 0) {
    throw new AppError('NOT_FILLABLE', 'There is no carcase on this day yet. Book animals for it, then allocate.');
  }
  return {
    figures,
    settings: await readSettings(db, figures.day.day),
    cuts: await listCuts(db),
    kinds: await listBoxKinds(db),
    offers: await listOffers(db, dayId),
    reserved: await listConfirmedLines(db, dayId),
    stock: await readFrozenStock(db, dayId),
  };
}

type Wishes = { locks: readonly WayLock[]; asked?: readonly ReservedLine[] };

/** The engine's question about a day, with the owner's locks. */
export function askAbout(facts: DayFacts, { locks, asked = [] }: Wishes): Omit<AllocationQuestion, 'lpText'> {
  const { figures, settings, cuts, kinds, offers, reserved, stock } = facts;
  const input = buildDayInput({
    ...{ cuts, kinds, offers, reserved, asked, locks, stock },
    sides: figures.sides,
    specification: figures.specification,
    butcheryTenthPencePerKg: settings.butcheryTenthPencePerKg,
    minceClosedReason: judgeDayMince(figures, settings).closedReason,
  });
  return { input, spreads: spreadsOf(figures) };
}

/** What the premises' setting says of mincing the meat of this day. */
export function judgeDayMince({ carcases }: DayCutouts, settings: Settings): MinceVerdict {
  const { minceAgeEffect: effect, minceWithinDays: days, minceBaggedWithinDays: baggedDays } = settings;
  const meat = carcases.map(({ row, facts }) => ({
    name: shortEarTag(row.animal.earTag) || 'A supposed carcase',
    daysFromKill: facts.hanging.days,
    isBagged: facts.hanging.method === 'in the bag',
  }));
  return judgeMince({ effect, days, baggedDays }, meat);
}

/** A carcase that is cut and weighed line by line leaves nothing to guess. */
function spreadsOf({ carcases }: DayCutouts): Record<string, Spread> {
  return Object.fromEntries(
    carcases.map(({ row, cutout }) => {
      const isCutWeighed = cutout.nodes.every((node) => node.level !== 'line' || node.source === 'weighed');
      return [row.id, isCutWeighed ? WEIGHED_SPREAD : defaultSpread(cutout.cold.source)];
    }),
  );
}
