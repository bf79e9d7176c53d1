import type { Message } from './message.ts';
import type { SmtpState } from './smtp.ts';

const STYLE = `
  body { font: 16px/1.5 system-ui, sans-serif; color: #1e1a18; background: #fbf6f1; margin: 0 auto; padding: 12px; max-width: 860px; }
  h1 { font-size: 1.3rem; } a { color: #a8341f; overflow-wrap: anywhere; }
  ul.mails { list-style: none; padding: 0; } .mails li { border-top: 1px solid #d9cdbf; }
  .mails a { display: block; padding: 12px 0; text-decoration: none; } .mails strong { display: block; text-decoration: underline; }
  .quiet { color: #5a514b; } form { display: inline-block; margin: 0 8px 8px 0; }
  button, input { font: inherit; min-height: 44px; padding: 0 14px; border: 1px solid #5a514b; border-radius: 3px; background: #fff; color: inherit; }
  iframe { width: 100%; height: 70vh; border: 1px solid #d9cdbf; background: #fff; }
  pre { white-space: pre-wrap; overflow-wrap: anywhere; font: inherit; border: 1px solid #d9cdbf; padding: 12px; background: #fff; }`;

function escape(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
}

/** Escaped text whose web addresses can be followed. */
function withLinks(text: string): string {
  const piece = (part: string, at: number) =>
    at % 2 === 0 ? escape(part) : `<a href="${escape(part)}" target="_blank" rel="noreferrer">${escape(part)}</a>`;
  return text
    .split(/(https?:\/\/[^\s<>"]*[^\s<>".,;:!?)])/)
    .map(piece)
    .join('');
}

function page(title: string, body: string): string {
  return `<!doctype html><html lang="en-GB"><head><meta charset="utf-8"><title>${escape(title)}</title>
<meta name="viewport" content="width=device-width, initial-scale=1"><style>${STYLE}</style></head><body>${body}</body></html>`;
}

function when(message: Message): string {
  return new Date(message.receivedAt).toLocaleString('en-GB', { timeZone: 'Europe/London' });
}

function stateOf({ isDown, refusesAll, refused }: SmtpState): string {
  if (isDown) return 'The mail server is down: mails wait at the sender.';
  if (refusesAll) return 'The mail server refuses every recipient for good.';
  if (refused.size > 0) return `The mail server refuses ${[...refused].join(', ')} for good.`;
  return 'The mail server takes every mail.';
}

const button = (action: string, label: string) =>
  `<form method="post" action="${action}"><button>${escape(label)}</button></form>`;

export function mailboxPage(messages: Message[], state: SmtpState, to: string): string {
  const rows = messages.toReversed().map(
    (message) => `<li><a href="/messages/${message.id}"><strong>${escape(message.subject || '(no subject)')}</strong>
      <span class="quiet">${escape(message.to.join(', '))} · ${when(message)}</span></a></li>`,
  );
  return page(
    'Mailbox',
    `<h1>Mailbox</h1><p class="quiet">Every mail that the shop sends on this machine ends here; none leaves it. ${escape(stateOf(state))}</p>
    <form method="get" action="/"><label>To <input name="to" type="search" value="${escape(to)}" placeholder="any address"></label> <button>Show</button></form>
    ${state.isDown ? button('/smtp/up', 'Bring the mail server up') : button('/smtp/down', 'Take the mail server down')}
    ${messages.length > 0 ? button('/clear', 'Delete all mails') : ''}
    ${rows.length > 0 ? `<ul class="mails">${rows.join('')}</ul>` : '<p>No mail yet.</p>'}`,
  );
}

export function messagePage(message: Message, note: string): string {
  const files = message.attachments.map(
    (file, at) =>
      `<li><a href="/messages/${message.id}/attachments/${at}" download>${escape(file.filename)}</a> <span class="quiet">${escape(file.contentType)}, ${file.size} bytes</span></li>`,
  );
  // Sandboxed: a mail's scripts never run; its links open in a window of their own.
  const html = `<h2>As it looks</h2><iframe title="The mail as it looks" src="/messages/${message.id}/html" sandbox="allow-popups allow-popups-to-escape-sandbox"></iframe>`;
  return page(
    message.subject,
    `<p><a href="/">Mailbox</a></p><h1>${escape(message.subject || '(no subject)')}</h1>${note ? `<p role="status">${escape(note)}</p>` : ''}
    <p class="quiet">To ${escape(message.to.join(', '))}<br>From ${escape(message.from)}<br>${when(message)}<br>Message-ID ${escape(message.messageId)}</p>
    ${files.length > 0 ? `<h2>Attachments</h2><ul>${files.join('')}</ul>` : ''}
    ${message.html === null ? '' : html}<h2>As plain text</h2><pre>${withLinks(message.text)}</pre>
    <p><a href="/messages/${message.id}/raw">The mail as it came</a></p>
    ${button(`/messages/${message.id}/bounce`, 'Send back as undeliverable')}`,
  );
}

/** The mail's own HTML, for the frame: every link opens in a new window. */
export function framedHtml(html: string): string {
  return `<base target="_blank">${html}`;
}
