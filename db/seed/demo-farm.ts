import type { Tx } from '#db/client.ts';
import { deliveryArea } from '#db/schema/delivery.ts';
import { datedSetting, farm } from '#db/schema/farm.ts';
import { collectionPoint } from '#db/schema/orders.ts';
import { promoCode } from '#db/schema/promo.ts';
import type { Day } from '#shared/domain/day.ts';

/** Everything about the farm is invented: the dale, the people, the premises and their numbers. */
const FARM = {
  name: 'Skelderwick',
  businessName: 'Skelderwick Farm',
  addressLines: ['Skelderwick Farm', 'Under Rigg', 'Skelderdale', 'ZZ1 1AA'],
  email: 'farm@skelderwick.example.com',
  phone: '01632 960100',
  story:
    'We keep about a hundred and forty head of native and native-cross cattle under the rigg. We kill four beasts a ' +
    'month and sell every cut of them: to three butchers in the dale, and by the box to whoever likes to know which ' +
    'farm their dinner came from.',
  abattoirName: 'Rowan Hill Abattoir',
  abattoirApprovalNo: 'ZZ 0001',
  cutterName: 'Rowan Hill Cutting',
  cutterApprovalNo: 'ZZ 0002',
  servingGrams: 165,
  freezerGramsPerLitre: 620,
};

const BRING = 'A cool bag, ice packs if you live far off, and your order number.';

const POINTS = [
  {
    name: 'The farm gate',
    addressLines: ['Skelderwick Farm', 'Under Rigg', 'ZZ1 1AA'],
    directions: 'Up the lane past the chapel; park on the left of the yard and come to the green door.',
    bring: BRING,
  },
  {
    name: 'The old chapel, Saltmere',
    addressLines: ['The Old Chapel', 'Market Place', 'Saltmere', 'ZZ2 4HH'],
    directions: 'The side door, next to the bus stop. We stand there with the white van.',
    bring: BRING,
  },
] as const;

const VAN = {
  name: 'Van round, Hollin Cross and Thornwick',
  addressLines: [],
  directions: 'The van comes in the afternoon and rings before it turns into your lane.',
  bring: 'Somebody at home, and room in the fridge: we hand chilled beef to people, not to porches.',
  kind: 'van' as const,
};

const AREA = {
  name: VAN.name,
  prefixes: ['ZZ3', 'ZZ4'],
  ...{ pricePence: 500, freeFromPence: 15_000, weekday: 6, startsAt: '12:00', endsAt: '17:00', capacity: 14 },
};

const CODE = { code: 'DALE10', percent: 10, minimumPence: 5_000, usageLimit: 100 };

export type DemoPoints = { gate: string; chapel: string };

export async function insertFarm(tx: Tx, validFrom: Day): Promise<DemoPoints> {
  await tx.insert(farm).values(FARM);
  await tx.insert(datedSetting).values([
    { key: 'isReallocationAutomatic', validFrom, value: true },
    { key: 'vertebralColumnMonths', validFrom, value: 30 },
    { key: 'isVertebralColumnRuleActive', validFrom, value: true },
    { key: 'killPence', validFrom, value: 16_500 },
    { key: 'butcheryTenthPencePerKg', validFrom, value: 1_100 },
  ]);
  const ids: string[] = [];
  for (const { addressLines, ...point } of POINTS) {
    const [row] = await tx
      .insert(collectionPoint)
      .values({ ...point, addressLines: [...addressLines] })
      .returning({ id: collectionPoint.id });
    if (row) ids.push(row.id);
  }
  const [van] = await tx.insert(collectionPoint).values(VAN).returning({ id: collectionPoint.id });
  await tx.insert(deliveryArea).values({ ...AREA, pointId: van?.id ?? '' });
  await tx.insert(promoCode).values(CODE);
  const [gate = '', chapel = ''] = ids;
  return { gate, chapel };
}
