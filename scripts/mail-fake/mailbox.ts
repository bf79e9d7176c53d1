import { randomUUID } from 'node:crypto';
import { mkdirSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { type Envelope, type Message, readMessage } from './message.ts';

const MOST_KEPT = 1_000;

export type Mailbox = {
  /** Newest last. */
  list(to?: string): Message[];
  find(id: string): Message | undefined;
  add(raw: Buffer, envelope: Envelope): Promise<void>;
  clear(): void;
  /** Calls `listener` for each mail that arrives from now on; the returned function ends that. */
  onArrival(listener: (message: Message) => void): () => void;
};

function isTo(message: Message, address: string): boolean {
  return message.to.some((recipient) => recipient.toLowerCase() === address.toLowerCase());
}

/** Keeps each mail as one JSON file in `dir`, so that the mailbox outlives a restart. */
export function openMailbox(dir: string): Mailbox {
  mkdirSync(dir, { recursive: true });
  const fileOf = (message: Message) =>
    path.join(dir, `${message.receivedAt.replaceAll(/[:.]/g, '-')}-${message.id}.json`);
  const names = readdirSync(dir).filter((name) => name.endsWith('.json'));
  const messages = names.sort().map((name) => JSON.parse(readFileSync(path.join(dir, name), 'utf8')) as Message);
  const listeners = new Set<(message: Message) => void>();

  function keep(message: Message): void {
    // Written beside and renamed: a stop in between leaves no half file that the next start would trip over.
    const file = fileOf(message);
    writeFileSync(`${file}.new`, JSON.stringify(message, null, 1));
    renameSync(`${file}.new`, file);
    messages.push(message);
    for (const old of messages.splice(0, messages.length - MOST_KEPT)) rmSync(fileOf(old), { force: true });
  }

  return {
    list: (to) => (to === undefined ? [...messages] : messages.filter((message) => isTo(message, to))),
    find: (id) => messages.find((message) => message.id === id),
    add: async (raw, envelope) => {
      const content = await readMessage(raw, envelope);
      const message = { id: randomUUID(), receivedAt: new Date().toISOString(), ...content };
      keep(message);
      for (const listener of listeners) listener(message);
    },
    clear: () => {
      for (const message of messages.splice(0)) rmSync(fileOf(message), { force: true });
    },
    onArrival: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
