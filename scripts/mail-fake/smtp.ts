import type { Readable } from 'node:stream';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import type { Mailbox } from './mailbox.ts';

const LARGEST_MAIL = 25 * 1024 * 1024;

/** How the SMTP server behaves: it works, it is down (421 to everyone), or it refuses some recipients for good (550). */
export type SmtpState = { isDown: boolean; refusesAll: boolean; refused: Set<string> };

function refusal(responseCode: number, text: string): Error {
  return Object.assign(new Error(text), { responseCode });
}

async function readAll(stream: Readable): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(part as Buffer);
  return Buffer.concat(parts);
}

/** Takes every mail without TLS or a password, as long as `state` lets it. */
export async function listenForMail(port: number, state: SmtpState, mailbox: Mailbox) {
  const down = () => (state.isDown ? refusal(421, 'The service is not available, try again later') : null);
  const server = new SMTPServer({
    name: 'mail-fake.example.com',
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: LARGEST_MAIL,
    rejectOversized: true,
    closeTimeout: 500,
    onConnect: (_session, done) => done(down()),
    onMailFrom: (_address, _session, done) => done(down()),
    onRcptTo: ({ address }, _session, done) => {
      const isRefused = state.refusesAll || state.refused.has(address.toLowerCase());
      done(down() ?? (isRefused ? refusal(550, '5.1.1 No such mailbox here') : null));
    },
    onData: (stream, { envelope }, done) => {
      const from = envelope.mailFrom === false ? '' : envelope.mailFrom.address;
      const to = envelope.rcptTo.map((recipient) => recipient.address);
      readAll(stream)
        .then((raw) => (stream.sizeExceeded ? undefined : mailbox.add(raw, { from, to })))
        .then(() => done(), done);
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
  // From here on an error is a client that broke off, which is its own affair.
  server.removeAllListeners('error').on('error', () => undefined);
  return {
    port: (server.server.address() as AddressInfo).port,
    stop: () => new Promise<void>((resolve) => server.close(() => resolve())),
  };
}
