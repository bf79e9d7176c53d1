import express, { type Express } from 'express';
import { bounceOf } from './bounce.ts';
import type { Mailbox } from './mailbox.ts';
import type { Message } from './message.ts';
import { framedHtml, mailboxPage, messagePage } from './pages.ts';
import type { SmtpState } from './smtp.ts';

export type Control = { smtp: 'up' | 'down' | 'refuse'; address?: string };
export type Inbound = { url: string; token: string };

type Parts = { mailbox: Mailbox; state: SmtpState; control: (change: Control) => void; inbound: Inbound | undefined };

function readControl(body: unknown): Control | undefined {
  if (typeof body !== 'object' || body === null || !('smtp' in body)) return undefined;
  const { smtp } = body;
  if (smtp !== 'up' && smtp !== 'down' && smtp !== 'refuse') return undefined;
  if (!('address' in body) || body.address === undefined) return { smtp };
  return typeof body.address === 'string' && body.address !== '' ? { smtp, address: body.address } : undefined;
}

/** Hands the delivery-status mail to the shop's own address for them. Returns what went wrong, or null. */
async function sendBounce(message: Message, inbound: Inbound | undefined): Promise<string | null> {
  if (!inbound) return 'No address for returned mails is set (MAIL_INBOUND_URL).';
  try {
    const answer = await fetch(inbound.url, {
      method: 'POST',
      headers: { 'content-type': 'message/rfc822', authorization: `Bearer ${inbound.token}` },
      body: bounceOf(message),
    });
    return answer.ok ? null : `${inbound.url} answered ${answer.status}: ${(await answer.text()).slice(0, 300)}`;
  } catch (error) {
    return `${inbound.url} cannot be reached: ${String(error)}`;
  }
}

function addApi(app: Express, { mailbox, control, inbound }: Parts): void {
  app.get('/api/messages', (request, response) => {
    response.json(mailbox.list(typeof request.query.to === 'string' ? request.query.to : undefined));
  });
  app.delete('/api/messages', (_request, response) => {
    mailbox.clear();
    response.status(204).end();
  });
  app.post('/api/messages/:id/bounce', async (request, response) => {
    const message = mailbox.find(request.params.id);
    if (!message) return void response.status(404).json({ error: 'No such mail.' });
    const trouble = await sendBounce(message, inbound);
    response.status(trouble === null ? 200 : 502).json(trouble === null ? { bounced: message.to } : { error: trouble });
  });
  app.post('/control', express.json(), (request, response) => {
    const change = readControl(request.body);
    if (!change)
      return void response.status(400).json({ error: 'Send {"smtp": "up" | "down" | "refuse", "address"?}.' });
    control(change);
    response.status(204).end();
  });
}

function addPages(app: Express, { mailbox, state, control, inbound }: Parts): void {
  app.get('/', (request, response) => {
    const to = typeof request.query.to === 'string' ? request.query.to.trim() : '';
    response.send(mailboxPage(mailbox.list(to === '' ? undefined : to), state, to));
  });
  app.post('/smtp/:state', (request, response) => {
    control({ smtp: request.params.state === 'down' ? 'down' : 'up' });
    response.redirect(303, '/');
  });
  app.post('/clear', (_request, response) => {
    mailbox.clear();
    response.redirect(303, '/');
  });
  app.use('/messages/:id', (request, response, next) => {
    const message = mailbox.find(request.params.id);
    if (!message) return void response.status(404).type('text').send('No such mail.');
    response.locals.message = message;
    next();
  });
  const of = (locals: Record<string, unknown>) => locals.message as Message;
  app.get('/messages/:id', (_request, response) => void response.send(messagePage(of(response.locals), '')));
  app.post('/messages/:id/bounce', async (_request, response) => {
    const message = of(response.locals);
    const trouble = await sendBounce(message, inbound);
    response.send(messagePage(message, trouble ?? 'The shop has been told that this mail could not be delivered.'));
  });
  app.get('/messages/:id/html', (_request, response) => {
    response.set('content-security-policy', "default-src 'none'; img-src data:; style-src 'unsafe-inline'");
    response.send(framedHtml(of(response.locals).html ?? ''));
  });
  app.get('/messages/:id/raw', (_request, response) => {
    response.type('text/plain; charset=utf-8').send(Buffer.from(of(response.locals).raw, 'latin1'));
  });
  app.get('/messages/:id/attachments/:at', (request, response) => {
    const file = of(response.locals).attachments[Number(request.params.at)];
    if (!file) return void response.status(404).type('text').send('No such attachment.');
    // Always a download: a mail must not put a page of its own on this origin.
    response.attachment(file.filename).type(file.contentType).send(Buffer.from(file.contentBase64, 'base64'));
  });
}

export function createMailboxApp(parts: Parts): Express {
  const app = express();
  app.disable('x-powered-by');
  addApi(app, parts);
  addPages(app, parts);
  return app;
}
