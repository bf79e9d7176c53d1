import type { Answer } from '#shared/contracts/endpoint.ts';
import type { TodayItem } from '#shared/contracts/office.ts';
import type { getTodaySchema } from '#shared/contracts/office-schema.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatCount, formatDay, formatMoney } from '#shared/domain/words.ts';
import type { Deps } from '#server/deps.ts';
import { listFailedRefunds } from '#server/payments/payment-queries.ts';
import { dayItems } from './day-items.ts';
import * as queries from './today-queries.ts';

const CLOSED_DAYS_SHOWN = 2;
const MAILS_SHOWN = 20;

type Today = Answer<typeof getTodaySchema>;

/** What needs doing, most pressing first, and how the cutting days stand. */
export async function getToday(deps: Deps): Promise<Today> {
  const { db } = deps;
  const today = deps.clock.today();
  const days = await queries.listTodayDays(db, CLOSED_DAYS_SHOWN);
  const dayIds = days.map((day) => day.id);
  const orders = await queries.countOrdersByState(db, dayIds);
  const refunds = await queries.sumRefunds(db, dayIds);
  const allocations = await queries.listNewestAllocations(db, dayIds);
  const working = days.filter((day) => day.state !== 'closed');
  return {
    today,
    items: [
      ...(await troubleItems(deps)),
      ...(await killSheetItems(deps)),
      ...working.flatMap((day) => dayItems({ day, today, allocations, orders })),
      ...(await tradeItems(deps)),
    ],
    days: days.map((day) => {
      const ofDay = orders.filter((row) => row.dayId === day.id);
      const pence = ofDay.reduce((sum, row) => sum + row.pence, 0) - (refunds.get(day.id) ?? 0);
      return {
        id: day.id,
        day: day.day,
        state: day.state,
        carcases: day.carcases,
        orders: ofDay.reduce((sum, row) => sum + row.orders, 0),
        soldPence: pence + tradePence(allocations, day.id),
      };
    }),
  };
}

/** Confirmed trade at the plan's weights, until it is invoiced on the scale's. */
function tradePence(allocations: readonly queries.DayAllocation[], dayId: string): number {
  const inForce = allocations.find((row) => row.cuttingDayId === dayId && row.state === 'published');
  return inForce?.plan.plan.trade.reduce((sum, line) => sum + line.incomePence, 0) ?? 0;
}

async function troubleItems({ db }: Deps): Promise<TodayItem[]> {
  const refunds = (await listFailedRefunds(db)).map((refund): TodayItem => ({
    kind: 'refund failed',
    title: `Refund of ${formatMoney(refund.amountPence)} to ${refund.name} failed`,
    detail: `Order ${refund.orderNo}. ${refund.error ?? 'The payment company gave no reason.'}`,
    href: '/office/orders',
  }));
  const mails = (await queries.listUndeliveredMails(db, MAILS_SHOWN)).map((mail): TodayItem => ({
    kind: 'mail failed',
    title: `Mail to ${mail.toAddress} ${mail.state === 'bounced' ? 'came back' : 'could not be sent'}`,
    detail: `${mail.subject}. ${mail.lastError ?? 'The mail server gave no reason.'}`,
    href: '/office/mails',
  }));
  const balances = (await queries.listFailedBalances(db)).map((balance): TodayItem => ({
    kind: 'balance failed',
    title: `${formatMoney(balance.amountPence)} of ${balance.name} is still open`,
    detail: `Order ${balance.orderNo} is packed, and the card for its rest refused. The customer has a link to pay.`,
    href: '/office/orders',
  }));
  return [...refunds, ...balances, ...mails];
}

async function killSheetItems(deps: Deps): Promise<TodayItem[]> {
  const missing = await queries.listMissingKillSheets(deps.db, deps.clock.today());
  return missing.map((carcase) => ({
    kind: 'kill sheet',
    title: `Kill sheet of ${formatEarTag(carcase.earTag)}`,
    detail: `Killed ${formatDay(carcase.killDay)}, still on estimated weights.`,
    href: `/office/carcases/${carcase.id}`,
  }));
}

async function tradeItems({ db }: Deps): Promise<TodayItem[]> {
  const asked = (await queries.listAskedReservations(db)).map((row): TodayItem => ({
    kind: 'reservation',
    title: `${row.businessName} asks for beef of ${formatDay(row.day)}`,
    detail: `Reservation ${row.reservationNo} holds nothing until you confirm it.`,
    href: '/office/trade',
  }));
  const applied = await queries.listApplications(db);
  if (applied.length === 0) return asked;
  const application: TodayItem = {
    kind: 'trade account',
    title: `${formatCount(applied.length, 'trade application')} to decide`,
    detail: applied.map((row) => row.businessName).join(', '),
    href: '/office/trade',
  };
  return [...asked, application];
}
