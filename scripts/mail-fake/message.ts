import { simpleParser } from 'mailparser';

export type Attachment = { filename: string; contentType: string; size: number; contentBase64: string };

/** A mail as the fake received it. `from` and `to` are the envelope's: what the sending server said, not what the headers claim. */
export type Message = {
  id: string;
  receivedAt: string;
  from: string;
  to: string[];
  messageId: string;
  subject: string;
  text: string;
  html: string | null;
  attachments: Attachment[];
  raw: string;
};

export type Envelope = { from: string; to: string[] };

export async function readMessage(raw: Buffer, envelope: Envelope): Promise<Omit<Message, 'id' | 'receivedAt'>> {
  const parsed = await simpleParser(raw);
  return {
    ...envelope,
    messageId: parsed.messageId ?? '',
    subject: parsed.subject ?? '',
    text: parsed.text ?? '',
    html: parsed.html === false || parsed.html === undefined ? null : parsed.html,
    attachments: parsed.attachments.map((part) => ({
      filename: part.filename ?? 'attachment',
      contentType: part.contentType,
      size: part.size,
      contentBase64: part.content.toString('base64'),
    })),
    // One character a byte: nothing is lost, whatever the mail's own encoding.
    raw: raw.toString('latin1'),
  };
}

/** The header lines as they came, without the body. */
export function headersOf(raw: string): string {
  return raw.slice(0, raw.search(/\r?\n\r?\n|$/)).replace(/\r?\n/g, '\r\n');
}
