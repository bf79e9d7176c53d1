import type { CutList } from '#hooks/shop.ts';
import type { Order } from '#shared/contracts/orders.ts';
import type { Box, BoxCard, CollectionPoint, CuttingDaySummary, LooseCut, ShopHome } from '#shared/contracts/shop.ts';

/** The shop's answers as the screens get them, for tests of screens and parts. */

export const THURSDAY = '11111111-1111-4111-8111-111111111111';
export const WEEK_LATER = '22222222-2222-4222-8222-222222222222';

const rail = {
  primals: [
    { id: 'fore-rib', name: 'Fore rib', shortName: 'Rib', grams: 32_000, soldGrams: 20_000, heldGrams: 0 },
    { id: 'loin', name: 'Loin', shortName: 'Loin', grams: 48_000, soldGrams: 30_000, heldGrams: 4_000 },
  ],
  narrowPrimals: [
    { id: 'ribs', name: 'Rib and loin', shortName: 'Rib', grams: 80_000, soldGrams: 50_000, heldGrams: 4_000 },
  ],
};

export function makeDay(over: Partial<CuttingDaySummary> = {}): CuttingDaySummary {
  return {
    id: THURSDAY,
    day: '2026-12-10',
    cutOffAt: '2026-12-08T18:00:00.000Z',
    isInTime: true,
    carcaseCount: 2,
    hungDays: 21,
    collectionDays: ['2026-12-11', '2026-12-12'],
    productGrams: 455_000,
    soldGrams: 233_000,
    rail,
    ...over,
  };
}

const days = [makeDay(), makeDay({ id: WEEK_LATER, day: '2026-12-17', cutOffAt: '2026-12-15T18:00:00.000Z' })];

function offersOf(product: string, frees: [number, number]) {
  return days.map((day, at) => ({
    offerId: `${product} ${at}`,
    dayId: day.id,
    day: day.day,
    free: frees[at] ?? 0,
    held: 0,
  }));
}

export function makeBoxCard(over: Partial<BoxCard> = {}): BoxCard {
  return {
    slug: 'ember',
    name: 'Ember',
    summary: 'Sirloin, rump, bavette',
    guaranteedGrams: 4_000,
    pricePence: 10_240,
    tenthPencePerKg: 25_600,
    offers: offersOf('ember', [2, 5]),
    swaps: [],
    ...over,
  };
}

export function makeBox(over: Partial<Box> = {}): Box {
  return {
    ...makeBoxCard(),
    lines: [{ name: 'Steaks', minGrams: 800, maxGrams: 1_000, cuts: ['Sirloin', 'Rump'], cooking: 'grill' }],
    servings: 24,
    freezerLitres: 8,
    rail: { boxes: 20, rail },
    days,
    ...over,
  };
}

export function makeCut(over: Partial<LooseCut> = {}): LooseCut {
  return {
    id: 'mince',
    name: 'Mince',
    description: 'Coarse.',
    cooking: 'mince',
    tenthPencePerKg: 9_800,
    upperGrams: 500,
    pricePence: 490,
    offers: offersOf('mince', [40, 60]),
    ...over,
  };
}

export function makeCounter(): { home: ShopHome; cuts: CutList } {
  const farm = {
    name: 'Skelderwick',
    businessName: 'Skelderwick Farm',
    addressLines: ['Skelderwick Farm', 'Under Rigg', 'ZZ1 1AA'],
    email: 'farm@skelderwick.example.com',
    phone: '01632 960100',
    story: 'We keep cattle.',
  };
  return { home: { farm, days, boxes: [makeBoxCard()], butchers: [] }, cuts: { days, cuts: [makeCut()] } };
}

export function makeOrderView(over: Partial<Order> = {}): Order {
  return {
    orderNo: 1042,
    token: 'abcdefghijklmnopqrstuvwx',
    state: 'confirmed',
    paymentState: 'paid',
    paymentUrl: null,
    paymentExpiresAt: null,
    name: 'Nell Arkwright',
    email: 'nell@example.com',
    note: '',
    day: '2026-12-10',
    cutOffAt: '2026-12-08T18:00:00.000Z',
    canChange: true,
    dayId: THURSDAY,
    slotId: '33333333-3333-4333-8333-333333333333',
    lines: [
      {
        ...{ id: '44444444-4444-4444-8444-444444444444', offerId: '55555555-5555-4555-8555-555555555555' },
        ...{ name: 'Ember', kind: 'box', quantity: 1, unitPricePence: 10_240, linePence: 10_240, unitGrams: 4_000 },
        swaps: [],
      },
    ],
    promoCode: null,
    deposit: null,
    isDelivered: false,
    discountPence: 0,
    deliveryPence: 0,
    totalPence: 10_240,
    refundedPence: 0,
    addition: null,
    version: 2,
    collection: {
      name: 'The farm gate',
      addressLines: ['Under Rigg', 'ZZ1 1AA'],
      directions: 'Green door.',
      bring: 'A cool bag.',
      startsAt: '2026-12-11T14:00:00.000Z',
      endsAt: '2026-12-11T14:30:00.000Z',
    },
    packs: [],
    ...over,
  };
}

export function makePoints(): CollectionPoint[] {
  const slot = (id: string, startsAt: string, free: number) => ({
    id,
    startsAt,
    endsAt: new Date(Date.parse(startsAt) + 30 * 60_000).toISOString(),
    free,
  });
  return [
    {
      id: 'gate',
      name: 'The farm gate',
      addressLines: ['Under Rigg', 'ZZ1 1AA'],
      directions: 'Green door.',
      slots: [
        slot('friday-2', '2026-12-11T14:00:00.000Z', 8),
        slot('friday-3', '2026-12-11T14:30:00.000Z', 0),
        slot('saturday-9', '2026-12-12T09:00:00.000Z', 1),
      ],
    },
    {
      id: 'chapel',
      name: 'The old chapel',
      addressLines: ['Market Place', 'ZZ2 4HH'],
      directions: 'Ring the bell.',
      slots: [slot('chapel-1', '2026-12-12T09:00:00.000Z', 0)],
    },
  ];
}
