import type { CollectionMail } from '#shared/contracts/packs.ts';

/** Mails that may go now: not sent yet, and nothing holds them back. */
export function sendable(mails: readonly CollectionMail[]): CollectionMail[] {
  return mails.filter((mail) => mail.mail === null && mail.holdBack === null);
}

/** `3 to confirm, 12 sent, 1 bounced`. */
export function describeMails(mails: readonly CollectionMail[]): string {
  const counts = new Map<string, number>();
  for (const { mail, holdBack } of mails) {
    const word = mail?.state ?? (holdBack === null ? 'to confirm' : 'held back');
    counts.set(word, (counts.get(word) ?? 0) + 1);
  }
  const order = ['to confirm', 'held back', 'queued', 'sent', 'failed', 'bounced'];
  const parts = order.flatMap((word) => (counts.has(word) ? [`${counts.get(word)} ${word}`] : []));
  return parts.length > 0 ? parts.join(', ') : 'no orders';
}
