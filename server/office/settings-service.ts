import type { Settings } from '#shared/contracts/office.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { readSettings, writeSettings } from '#server/farm/farm-settings.ts';

export function getSettings(deps: Deps): Promise<Settings> {
  return readSettings(deps.db, deps.clock.today());
}

export async function editSettings(deps: Deps, byUserId: string, to: Settings): Promise<Settings> {
  const today = deps.clock.today();
  return deps.db.transaction(async (tx) => {
    const from = await readSettings(tx, today);
    await writeSettings(tx, today, to);
    const detail = { from, to, validFrom: today };
    await recordAudit(tx, { byUserId, action: 'edited', subject: 'settings', subjectId: 'farm', detail });
    return readSettings(tx, today);
  });
}
