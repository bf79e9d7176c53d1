import { simpleParser } from 'mailparser';

export type DeliveryReport = {
  /** Of the mail that could not be delivered, with its angle brackets. */
  messageId: string;
  failures: { address: string; reason: string }[];
};

/**
 * Reads a delivery-status mail (RFC 3464): its machine-readable part names each address and what became of it, its last
 * part brings the headers of the mail that was sent. Null for any other mail.
 */
export async function readDeliveryReport(raw: Buffer): Promise<DeliveryReport | null> {
  const mail = await simpleParser(raw, { keepDeliveryStatus: true, skipTextToHtml: true });
  const partOf = (...types: string[]) => mail.attachments.find((part) => types.includes(part.contentType));
  const status = partOf('message/delivery-status');
  const returned = partOf('text/rfc822-headers', 'message/rfc822');
  if (!status || !returned) return null;
  const messageId = /^message-id:\s*(<[^>\s]+>)/im.exec(unfold(returned.content))?.[1];
  if (!messageId) return null;
  const failures = unfold(status.content)
    .split(/\n\s*\n/)
    .flatMap((group) => {
      const address = field(group, 'final-recipient')?.replace(/^rfc822;\s*/i, '');
      if (field(group, 'action')?.toLowerCase() !== 'failed' || !address) return [];
      const reason = field(group, 'diagnostic-code')?.replace(/^smtp;\s*/i, '') ?? field(group, 'status') ?? '';
      return [{ address, reason }];
    });
  return { messageId, failures };
}

function unfold(content: Buffer): string {
  return content
    .toString('utf8')
    .replace(/\r\n/g, '\n')
    .replace(/\n[ \t]+/g, ' ');
}

function field(group: string, name: string): string | undefined {
  return new RegExp(`^${name}:[ \\t]*(.+)$`, 'im').exec(group)?.[1]?.trim();
}
