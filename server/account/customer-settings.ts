import type { CustomerSettings } from '#shared/contracts/customers.ts';
import { CustomerSettings as CustomerSettingsSchema } from '#shared/contracts/customers-schema.ts';
import type { Day } from '#shared/domain/day.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { listSettings, setSetting } from '#server/farm/farm-queries.ts';

/** What holds until the owner sets something else. */
const UNSET: CustomerSettings = {
  inviteAfterWeeks: 8,
  waitingHoldHours: 24,
  standingFirstReminderDays: 7,
  standingSecondReminderDays: 2,
  standingChargeHours: 24,
  standingTerms:
    'Every so many weeks we keep your box on the next cutting day and charge your card the price of that day, shortly before orders for it close. We write twice before, with the price and the day, and you can skip that box with one press. You can pause or end the standing order in your account at any time, at no cost; what has not been charged is then not charged.',
};
const KEYS = Object.keys(UNSET) as (keyof CustomerSettings)[];

/** The settings in force on a day. */
export async function readCustomerSettings(db: Db | Tx, on: Day): Promise<CustomerSettings> {
  return CustomerSettingsSchema.parse({ ...UNSET, ...Object.fromEntries(await listSettings(db, KEYS, on)) });
}

/** In force from today on; only what differs is written. */
export async function editCustomerSettings(
  deps: Deps,
  byUserId: string,
  to: CustomerSettings,
): Promise<CustomerSettings> {
  const today = deps.clock.today();
  return deps.db.transaction(async (tx) => {
    const from = await readCustomerSettings(tx, today);
    for (const key of KEYS) {
      if (from[key] !== to[key]) await setSetting(tx, { key, validFrom: today, value: to[key] });
    }
    const detail = { from, to, validFrom: today };
    await recordAudit(tx, { byUserId, action: 'edited', subject: 'customer settings', subjectId: 'farm', detail });
    return readCustomerSettings(tx, today);
  });
}
