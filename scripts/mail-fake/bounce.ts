import { randomUUID } from 'node:crypto';
import { type Message, headersOf } from './message.ts';

/**
 * The mail that a mail server sends back when a mailbox does not exist: multipart/report with a delivery-status part
 * (RFC 3464) and the headers of the mail that could not be delivered, its Message-ID among them.
 */
export function bounceOf(message: Pick<Message, 'from' | 'to' | 'raw'>): string {
  const boundary = `report-${randomUUID()}`;
  const part = (type: string, ...lines: string[]) => [`--${boundary}`, `Content-Type: ${type}`, '', ...lines, ''];
  const statuses = message.to.flatMap((address) => [
    '',
    `Original-Recipient: rfc822;${address}`,
    `Final-Recipient: rfc822;${address}`,
    'Action: failed',
    'Status: 5.1.1',
    'Diagnostic-Code: smtp; 550 5.1.1 No such mailbox here',
  ]);
  return [
    'From: Mail Delivery System <mailer-daemon@mail-fake.example.com>',
    `To: ${message.from}`,
    'Subject: Undelivered mail returned to sender',
    `Date: ${new Date().toUTCString().replace('GMT', '+0000')}`,
    `Message-ID: <${randomUUID()}@mail-fake.example.com>`,
    'Auto-Submitted: auto-replied',
    'MIME-Version: 1.0',
    `Content-Type: multipart/report; report-type=delivery-status; boundary="${boundary}"`,
    '',
    ...part(
      'text/plain; charset=utf-8',
      `Your mail could not be delivered to ${message.to.join(', ')}: no such mailbox.`,
    ),
    ...part('message/delivery-status', 'Reporting-MTA: dns; mail-fake.example.com', ...statuses),
    ...part('text/rfc822-headers', headersOf(message.raw)),
    `--${boundary}--`,
    '',
  ].join('\r\n');
}
