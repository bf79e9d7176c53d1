import { auditEntry } from '#db/schema/audit.ts';
import type { Db, Tx } from '#server/deps.ts';

export type AuditNote = {
  byUserId: string | null;
  action: string;
  subject: string;
  subjectId: string;
  detail?: Record<string, unknown>;
};

/** Who changed what, in the transaction of the change. */
export async function recordAudit(db: Db | Tx, note: AuditNote): Promise<void> {
  await db.insert(auditEntry).values(note);
}
