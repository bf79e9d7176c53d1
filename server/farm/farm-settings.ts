import type { Settings } from '#shared/contracts/office.ts';
import { Settings as SettingsSchema } from '#shared/contracts/office-schema.ts';
import type { Day } from '#shared/domain/day.ts';
import type { VertebraeRule } from '#shared/engine/cutout/cutout-types.ts';
import type { Db, Tx } from '#server/deps.ts';
import { listSettings, setSetting } from './farm-queries.ts';

/**
 * What holds until the owner sets something else. The vertebral column threshold is on until a legal check says otherwise;
 * the costs are common practice, to be put right by the farm before its first sale. The levy is both parts of it for cattle
 * in England from April 2024, since who kills for himself bears both.
 */
const UNSET: Settings = {
  isReallocationAutomatic: false,
  vertebralColumnMonths: 30,
  isVertebralColumnRuleActive: true,
  isVertebralColumnPremisesAuthorised: false,
  minceAgeEffect: 'caution',
  minceWithinDays: 6,
  minceBaggedWithinDays: 15,
  killPence: 16_500,
  inspectionPence: 600,
  levyPence: 675,
  haulagePence: 4_000,
  butcheryTenthPencePerKg: 1_100,
  cardRatePpht: 1_500,
  cardFixedPence: 20,
};

const KEYS = Object.keys(UNSET) as (keyof Settings)[];

/** The settings in force on a day. */
export async function readSettings(db: Db | Tx, on: Day): Promise<Settings> {
  const stored = await listSettings(db, KEYS, on);
  return SettingsSchema.parse({ ...UNSET, ...Object.fromEntries(stored) });
}

/** In force from the day on; only what differs from that day's settings is written. */
export async function writeSettings(db: Db | Tx, validFrom: Day, settings: Settings): Promise<void> {
  const before = await readSettings(db, validFrom);
  for (const key of KEYS) {
    if (before[key] !== settings[key]) await setSetting(db, { key, validFrom, value: settings[key] });
  }
}

/** Whether ways that keep vertebral column are closed, by the rule in force on the day of kill. */
export async function readVertebraeRule(db: Db | Tx, killDay: Day): Promise<VertebraeRule> {
  const settings = await readSettings(db, killDay);
  return {
    isActive: settings.isVertebralColumnRuleActive,
    months: settings.vertebralColumnMonths,
    isPremisesAuthorised: settings.isVertebralColumnPremisesAuthorised,
  };
}
