import type { TradeAccount } from '#shared/contracts/trade.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import type { Caller } from '#server/http/route.ts';
import { readProductNames, type ProductNames } from './product-names.ts';
import {
  addAccount,
  findAccount,
  findAccountOf,
  listAccounts,
  replacePrices,
  setRole,
  updateAccount,
  type AccountRow,
} from './trade-queries.ts';

export async function getAccountOf(deps: Deps, caller: Caller): Promise<TradeAccount | null> {
  const row = await findAccountOf(deps.db, caller.id);
  return row && describeAccount(row, await readProductNames(deps.db));
}

export type Application = { businessName: string; addressLines: string[]; phone: string };

/** One account a person; applying again is allowed after a refusal and corrects what was written. */
export async function applyForTrade(deps: Deps, caller: Caller, application: Application): Promise<TradeAccount> {
  return deps.db.transaction(async (tx) => {
    const added = await addAccount(tx, { ...application, userId: caller.id });
    const row = await getOwn(tx, caller.id);
    if (!added) {
      if (row.state === 'approved') {
        throw new AppError('ALREADY_KNOWN', 'Your trade account is approved already. Nothing was changed.');
      }
      await updateAccount(tx, row.id, { version: row.version, values: { ...application, state: 'applied' } });
    }
    const note = { byUserId: caller.id, action: 'applied', subject: 'trade account', subjectId: row.id };
    await recordAudit(tx, { ...note, detail: application });
    return describeAccount(await getOwn(tx, caller.id), await readProductNames(tx));
  });
}

async function getOwn(tx: Tx, userId: string): Promise<AccountRow> {
  const row = await findAccountOf(tx, userId);
  if (!row) throw new AppError('NOT_FOUND', 'You have no trade account yet.');
  return row;
}

export async function listTradeAccounts(deps: Deps): Promise<TradeAccount[]> {
  const names = await readProductNames(deps.db);
  return (await listAccounts(deps.db)).map((row) => describeAccount(row, names));
}

export type Decision = { accountId: string; version: number; state: 'approved' | 'refused' };

/** Approval is what makes a person a butcher; a refusal takes it back. */
export async function decideAccount(deps: Deps, byUserId: string, decision: Decision): Promise<TradeAccount> {
  const { accountId, version, state } = decision;
  return editAccount(deps, { accountId, version, byUserId, action: state }, async (tx, row) => {
    await setRole(tx, row.userId, state === 'approved' ? 'butcher' : 'customer');
    return { state };
  });
}

export type PriceList = {
  accountId: string;
  version: number;
  prices: { product: string; tenthPencePerKg: number; basis: 'scale weight' | 'cold weight' }[];
};

/** Replaces the whole price list. A product may stand on it once. */
export async function setPrices(deps: Deps, byUserId: string, list: PriceList): Promise<TradeAccount> {
  const { accountId, version, prices } = list;
  const names = await readProductNames(deps.db);
  const fields: Record<string, string> = {};
  for (const [index, { product }] of prices.entries()) {
    if (!names.has(product)) fields[`prices.${index}.product`] = 'There is no such product.';
    else if (prices.findIndex((price) => price.product === product) !== index) {
      fields[`prices.${index}.product`] = 'This product stands on the list twice.';
    }
  }
  if (Object.keys(fields).length > 0) throw new AppError('INVALID_INPUT', 'The price list was not saved.', { fields });
  return editAccount(deps, { accountId, version, byUserId, action: 'priced' }, async (tx, row) => {
    await replacePrices(tx, row.id, prices);
    return {};
  });
}

type Edit = { accountId: string; version: number; byUserId: string; action: string };

async function editAccount(
  deps: Deps,
  { accountId, version, byUserId, action }: Edit,
  change: (tx: Tx, row: AccountRow) => Promise<{ state?: 'approved' | 'refused' }>,
): Promise<TradeAccount> {
  return deps.db.transaction(async (tx) => {
    const row = await getAccount(tx, accountId);
    const values = await change(tx, row);
    if (!(await updateAccount(tx, accountId, { version, values }))) {
      throw new AppError(
        'STATE_CHANGED',
        'This account has changed since you opened it. Nothing was saved; look again.',
      );
    }
    await recordAudit(tx, { byUserId, action, subject: 'trade account', subjectId: accountId });
    return describeAccount(await getAccount(tx, accountId), await readProductNames(tx));
  });
}

async function getAccount(db: Db | Tx, accountId: string): Promise<AccountRow> {
  const row = await findAccount(db, accountId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such trade account.');
  return row;
}

function describeAccount(row: AccountRow, names: ProductNames): TradeAccount {
  const { id, businessName, addressLines, phone, email, state, version } = row;
  const prices = row.prices.map(({ product, tenthPencePerKg, basis }) => ({
    product,
    name: names.get(product) ?? product,
    tenthPencePerKg,
    basis,
  }));
  return { id, businessName, addressLines, phone, email, state, version, prices };
}
