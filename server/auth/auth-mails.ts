import { randomUUID } from 'node:crypto';
import type { Db } from '#db/client.ts';
import { letterHtml, letterText, type LetterPart } from '#server/mail/letter-html.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import type { AuthMail } from './auth.ts';

export async function sendVerificationMail(db: Db, mail: AuthMail): Promise<void> {
  await sendAuthMail(db, mail, {
    kind: 'verify e-mail',
    subject: 'Confirm your e-mail address',
    parts: [
      { kind: 'heading', text: 'Is this your address?' },
      {
        kind: 'text',
        text: 'Somebody, most likely you, opened an account with this e-mail address. Press the button to confirm it. The link works for one hour.',
      },
      { kind: 'button', text: 'Confirm this address', url: mail.url },
      { kind: 'text', text: 'If it was not you, do nothing: without this step the account stays closed.' },
    ],
  });
}

export async function sendPasswordResetMail(db: Db, mail: AuthMail): Promise<void> {
  await sendAuthMail(db, mail, {
    kind: 'reset password',
    subject: 'Choose a new password',
    parts: [
      { kind: 'heading', text: 'A new password' },
      { kind: 'text', text: 'Press the button to choose a new password. The link works once, for one hour.' },
      { kind: 'button', text: 'Choose a new password', url: mail.url },
      { kind: 'text', text: 'If you did not ask for this, do nothing: your password stays as it is.' },
    ],
  });
}

async function sendAuthMail(
  db: Db,
  mail: AuthMail,
  letter: { kind: string; subject: string; parts: LetterPart[] },
): Promise<void> {
  const farm = await getFarm(db);
  await queueMail(db, {
    eventKey: `${letter.kind} ${randomUUID()}`,
    kind: letter.kind,
    to: mail.to,
    subject: `${letter.subject} · ${farm.name}`,
    text: letterText(farm.name, letter.parts),
    html: letterHtml(farm.name, letter.parts),
  });
}
