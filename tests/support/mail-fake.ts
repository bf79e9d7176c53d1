import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { type MailFake, startMailFake } from '#scripts/mail-fake/server.ts';

export type TestMailFake = MailFake & { smtpUrl: string };

/** A mail server on free ports with an empty mailbox of its own. */
export async function startTestMailFake(inbound: { url: string; token: string } | null = null): Promise<TestMailFake> {
  const dir = await mkdtemp(path.join(tmpdir(), 'wholeside-mail-'));
  const fake = await startMailFake({
    smtpPort: 0,
    httpPort: 0,
    dir,
    ...(inbound ? { inboundUrl: inbound.url, inboundToken: inbound.token } : {}),
  });
  return {
    ...fake,
    smtpUrl: `smtp://127.0.0.1:${fake.smtpPort}`,
    stop: async () => {
      await fake.stop();
      await rm(dir, { recursive: true, force: true });
    },
  };
}
