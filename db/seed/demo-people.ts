import type { Tx } from '#db/client.ts';
import { account, user } from '#db/schema/auth.ts';
import { tradeAccount, tradePrice } from '#db/schema/trade.ts';
import type { Role } from '#shared/domain/roles.ts';
import type { Chance } from './chance.ts';

const FIRST = ['Ada', 'Bram', 'Celia', 'Dorrit', 'Edmund', 'Flora', 'Gideon', 'Hetty', 'Ivo', 'Jory'];
const LAST = ['Fenwether', 'Quillby', 'Tarnside', 'Oxlade'];

const BUTCHERS = [
  {
    name: 'Maud Pennick',
    email: 'butcher@pennick.example.com',
    businessName: 'Pennick & Daughter',
    addressLines: ['4 Bridge End', 'Thornwick', 'ZZ4 2PD'],
    phone: '01632 960211',
    // Tenths of a penny per kg: side, forequarter, hindquarter.
    rates: [7_400, 6_150, 8_900],
  },
  {
    name: 'Silas Oddie',
    email: 'silas@oddie.example.com',
    businessName: "Oddie's of Saltmere",
    addressLines: ['Market Place', 'Saltmere', 'ZZ2 4HJ'],
    phone: '01632 960212',
    rates: [7_350, 6_200, 8_800],
  },
  {
    name: 'Nell Brack',
    email: 'nell@bracklane.example.com',
    businessName: 'Brack Lane Meats',
    addressLines: ['Unit 2, Brack Lane', 'Hollin Cross', 'ZZ3 1BL'],
    phone: '01632 960213',
    rates: [7_300, 6_100, 8_850],
  },
] as const;

/** Cuts and primals that each butcher has a price for, in tenths of a penny per kg. */
const CUT_RATES: Readonly<Record<string, number>> = {
  'cut:brisket-joint': 9_600,
  'cut:diced-beef': 9_800,
  'cut:rump-steak': 17_500,
  'cut:sirloin-steak': 24_500,
  'cut:mince': 8_200,
  'primal:fore-rib': 13_900,
  'primal:topside': 11_200,
};

/** The last of the customers has a shop and waits for the farm's answer. */
const APPLICATION = {
  businessName: "Oxlade's Larder",
  addressLines: ['9 Tan Row', 'Saltmere', 'ZZ2 4TR'],
  phone: '01632 960214',
  state: 'applied',
} satisfies Partial<typeof tradeAccount.$inferInsert>;

export type Person = { id: string; name: string; email: string; phone: string };
export type DemoPeople = { ownerId: string; packerId: string; customers: Person[]; butchers: { accountId: string }[] };
export type SignIn = { role: Role; name: string; email: string; password: string };

/** Forty customers, one of whom would like to buy for a shop, three butchers, an owner and a packer. Only those with a password can sign in. */
export async function insertPeople(
  tx: Tx,
  chance: Chance,
  { signIns, hash }: { signIns: readonly SignIn[]; hash: (password: string) => Promise<string> },
): Promise<DemoPeople> {
  const addUser = async (role: Role, name: string, email: string) => {
    const [row] = await tx.insert(user).values({ name, email, emailVerified: true, role }).returning({ id: user.id });
    if (!row) throw new Error('A person was not kept.');
    const known = signIns.find((signIn) => signIn.email === email);
    if (known) {
      const password = await hash(known.password);
      await tx.insert(account).values({ userId: row.id, providerId: 'credential', accountId: row.id, password });
    }
    return row.id;
  };
  const staff = (role: Role) => {
    const found = signIns.find((signIn) => signIn.role === role);
    if (!found) throw new Error(`The sign-ins name no ${role}.`);
    return addUser(role, found.name, found.email);
  };
  const ownerId = await staff('owner');
  const packerId = await staff('packer');
  const customers: Person[] = [];
  for (const [index, name] of LAST.flatMap((last) => FIRST.map((first) => `${first} ${last}`)).entries()) {
    const email = `${name.toLowerCase().replace(' ', '.')}@example.com`;
    const phone = `07700 900${String(101 + index * 3 + chance.between(0, 2))}`;
    customers.push({ id: await addUser('customer', name, email), name, email, phone });
  }
  const butchers: { accountId: string }[] = [];
  for (const butcher of BUTCHERS) {
    const userId = await addUser('butcher', butcher.name, butcher.email);
    butchers.push({ accountId: await insertTradeAccount(tx, userId, butcher) });
  }
  const applicant = customers.at(-1);
  if (applicant) await tx.insert(tradeAccount).values({ ...APPLICATION, userId: applicant.id });
  return { ownerId, packerId, customers, butchers };
}

async function insertTradeAccount(tx: Tx, userId: string, butcher: (typeof BUTCHERS)[number]): Promise<string> {
  const { businessName, phone, rates } = butcher;
  const [row] = await tx
    .insert(tradeAccount)
    .values({ userId, businessName, phone, addressLines: [...butcher.addressLines], state: 'approved' })
    .returning({ id: tradeAccount.id });
  if (!row) throw new Error('A trade account was not kept.');
  const [side, fore, hind] = rates;
  const list = { side, fore, hind, ...CUT_RATES };
  await tx.insert(tradePrice).values(
    Object.entries(list).map(([product, tenthPencePerKg]) => ({
      accountId: row.id,
      product,
      tenthPencePerKg,
      basis: 'scale weight' as const,
    })),
  );
  return row.id;
}
