import { createTransport } from 'nodemailer';

export type Attachment = { filename: string; contentType: string; content: string };

export type OutgoingMail = {
  messageId: string;
  to: string;
  subject: string;
  text: string;
  html: string;
  attachments: Attachment[];
  /** Marketing mail alone. */
  unsubscribeUrl: string | null;
};

/** `refused` is permanent (the address does not take mail); a thrown error is worth another try. */
export type MailResult = { outcome: 'sent' } | { outcome: 'refused'; reason: string };

export type Mailer = { send: (mail: OutgoingMail) => Promise<MailResult>; close: () => void };

export function createMailer(smtpUrl: string, from: string): Mailer {
  const transport = createTransport(smtpUrl, { from });
  return {
    send: async ({ unsubscribeUrl, ...mail }) => {
      try {
        await transport.sendMail(unsubscribeUrl ? { ...mail, ...listHeaders(unsubscribeUrl) } : mail);
        return { outcome: 'sent' };
      } catch (error) {
        if (isPermanent(error)) return { outcome: 'refused', reason: error.message };
        throw error;
      }
    },
    close: () => transport.close(),
  };
}

/** RFC 8058: a mail program may end the mails by one POST of its own. The mail server's signature must cover both headers. */
function listHeaders(url: string) {
  return { list: { unsubscribe: { url } }, headers: { 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' } };
}

/** SMTP answers from 500 up are final (RFC 5321, section 4.2.1). */
function isPermanent(error: unknown): error is Error {
  return error instanceof Error && 'responseCode' in error && Number(error.responseCode) >= 500;
}
