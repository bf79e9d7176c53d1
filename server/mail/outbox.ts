import { randomUUID } from 'node:crypto';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { enqueue } from '#server/queue.ts';
import { findMail, insertMail, recordAttempt } from './mail-queries.ts';
import type { Attachment } from './mailer.ts';

/** After this many tries (about a day of growing pauses) a mail counts as failed and waits for a person. */
const LAST_ATTEMPT = 10;

export type Letter = {
  /** Names the event, so that the same event never writes a second mail. */
  eventKey: string;
  kind: string;
  orderId?: string;
  to: string;
  subject: string;
  text: string;
  html: string;
  attachments?: Attachment[];
  /** Marketing mail alone: ends such mail for this address. */
  unsubscribeUrl?: string;
};

/** Puts a mail in the outbox inside the caller's transaction; it leaves after the commit. Null: this event has its mail. */
export async function queueMail(db: Db | Tx, letter: Letter): Promise<string | null> {
  const mailId = await insertMail(db, {
    eventKey: letter.eventKey,
    kind: letter.kind,
    orderId: letter.orderId ?? null,
    toAddress: letter.to,
    subject: letter.subject,
    text: letter.text,
    html: letter.html,
    attachments: letter.attachments ?? [],
    unsubscribeUrl: letter.unsubscribeUrl ?? null,
    messageId: `<${randomUUID()}@wholeside.example>`,
  });
  if (mailId) await enqueue(db, 'send-mail', { mailId });
  return mailId;
}

/** The worker's task. At least once, always with the same Message-ID; throws when it is worth another try. */
export async function sendMail(deps: Deps, mailId: string): Promise<void> {
  const mail = await findMail(deps.db, mailId);
  if (!mail || mail.state !== 'queued') return;
  try {
    const result = await deps.mailer.send({
      messageId: mail.messageId,
      to: mail.toAddress,
      subject: mail.subject,
      text: mail.text,
      html: mail.html,
      attachments: mail.attachments as Attachment[],
      unsubscribeUrl: mail.unsubscribeUrl,
    });
    if (result.outcome === 'sent') {
      await recordAttempt(deps.db, mailId, { state: 'sent', error: null, sentAt: deps.clock.now() });
    } else {
      await recordAttempt(deps.db, mailId, { state: 'bounced', error: result.reason, sentAt: null });
    }
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    const isLast = mail.attempts + 1 >= LAST_ATTEMPT;
    await recordAttempt(deps.db, mailId, { state: isLast ? 'failed' : 'queued', error: reason, sentAt: null });
    if (!isLast) throw error;
  }
}
