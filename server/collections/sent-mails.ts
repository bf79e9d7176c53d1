import type { Mail } from '#shared/contracts/packs.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { listNewestMails, lockMail, requeueMail, type MailRow } from '#server/mail/mail-queries.ts';
import { enqueue } from '#server/queue.ts';

const MOST_SHOWN = 300;

export async function readMails(deps: Deps): Promise<{ mails: Mail[] }> {
  const rows = await listNewestMails(deps.db, MOST_SHOWN);
  return { mails: rows.map(describe) };
}

function describe(row: MailRow): Mail {
  const { id, kind, toAddress, subject, state, attempts, lastError } = row;
  return {
    ...{ id, kind, subject, state, attempts, lastError },
    to: toAddress,
    createdAt: row.createdAt.toISOString(),
    sentAt: row.sentAt?.toISOString() ?? null,
  };
}

/** A person's second try, under the same Message-ID. One that still waits would only go out twice. */
export async function resendMail(deps: Deps, mailId: string, byUserId: string): Promise<Mail> {
  return deps.db.transaction(async (tx) => {
    const mail = await lockMail(tx, mailId);
    if (!mail) throw new AppError('NOT_FOUND', 'There is no such mail.');
    if (mail.state === 'queued') {
      throw new AppError('STATE_CHANGED', 'This mail is on its way already. Nothing was sent a second time.');
    }
    const again = await requeueMail(tx, mailId);
    await enqueue(tx, 'send-mail', { mailId });
    await recordAudit(tx, { byUserId, action: 'sent again', subject: 'mail', subjectId: mailId });
    return describe(again);
  });
}
