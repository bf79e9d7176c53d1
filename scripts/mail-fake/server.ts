import type { AddressInfo } from 'node:net';
import { openMailbox } from './mailbox.ts';
import type { Message } from './message.ts';
import { type SmtpState, listenForMail } from './smtp.ts';
import { type Control, createMailboxApp } from './web.ts';

export type MailFakeOptions = {
  /** 0 takes a free port. */
  smtpPort: number;
  httpPort: number;
  /** Where the mails are kept. */
  dir: string;
  /** Where delivery-status mails are posted, and the bearer token for it. */
  inboundUrl?: string;
  inboundToken?: string;
};

export type MailFake = {
  smtpPort: number;
  httpPort: number;
  messages(): Message[];
  lastMailTo(address: string): Message | undefined;
  /** Waits for a mail to `address` that `isIt` accepts; one that has arrived already counts. */
  waitForMail(address: string, isIt?: (message: Message) => boolean): Promise<Message>;
  control(change: Control): void;
  clear(): void;
  stop(): Promise<void>;
};

function applyControl(state: SmtpState, { smtp, address }: Control): void {
  state.isDown = smtp === 'down';
  if (smtp === 'refuse' && address === undefined) state.refusesAll = true;
  if (smtp === 'refuse' && address !== undefined) state.refused.add(address.toLowerCase());
  if (smtp !== 'up') return;
  if (address !== undefined) {
    state.refused.delete(address.toLowerCase());
    return;
  }
  state.refusesAll = false;
  state.refused.clear();
}

const PATIENCE_MS = 10_000;

/** A mail server of our own for development and tests: takes mails over SMTP and shows them on a page. */
export async function startMailFake(options: MailFakeOptions): Promise<MailFake> {
  const mailbox = openMailbox(options.dir);
  const state: SmtpState = { isDown: false, refusesAll: false, refused: new Set() };
  const control = (change: Control) => applyControl(state, change);
  const smtp = await listenForMail(options.smtpPort, state, mailbox);
  const inbound = options.inboundUrl ? { url: options.inboundUrl, token: options.inboundToken ?? '' } : undefined;
  const app = createMailboxApp({ mailbox, state, control, inbound });
  const web = await new Promise<ReturnType<typeof app.listen>>((resolve, reject) => {
    const server = app.listen(options.httpPort, '127.0.0.1', (error) => (error ? reject(error) : resolve(server)));
  });
  return {
    smtpPort: smtp.port,
    httpPort: (web.address() as AddressInfo).port,
    messages: () => mailbox.list(),
    lastMailTo: (address) => mailbox.list(address).at(-1),
    waitForMail: (address, isIt = () => true) =>
      new Promise((resolve, reject) => {
        const find = () => mailbox.list(address).findLast(isIt);
        const found = find();
        if (found) return resolve(found);
        const settle = (act: () => void) => {
          clearTimeout(timer);
          forget();
          act();
        };
        const forget = mailbox.onArrival(() => {
          const arrived = find();
          if (arrived) settle(() => resolve(arrived));
        });
        const late = new Error(`No such mail to ${address} within ${PATIENCE_MS / 1000} s.`);
        const timer = setTimeout(() => settle(() => reject(late)), PATIENCE_MS);
      }),
    control,
    clear: () => mailbox.clear(),
    stop: async () => {
      const closed = new Promise<void>((resolve) => web.close(() => resolve()));
      web.closeAllConnections();
      await Promise.all([closed, smtp.stop()]);
    },
  };
}
