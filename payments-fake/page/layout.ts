import type { Response } from 'express';
import { type Html, html, raw } from './html.ts';
import { style } from './style.ts';

/** No script at all, and nothing from elsewhere. */
const policy = "default-src 'none'; style-src 'unsafe-inline'; base-uri 'none'; frame-ancestors 'none'";

export function sendPage(
  response: Response,
  { status, title, body }: { status: number; title: string; body: Html },
): void {
  const page = html`<!doctype html>
    <html lang="en-GB">
      <head>
        <meta charset="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="robots" content="noindex" />
        <title>${title}</title>
        <style>
          ${raw(style)}
        </style>
      </head>
      <body>
        <main>
          <header>
            <span class="mark">Card payment</span>
            <span class="tag">Test page: no money moves</span>
          </header>
          ${body}
        </main>
      </body>
    </html>`;
  response
    .status(status)
    .set({
      'Content-Security-Policy': policy,
      'Cache-Control': 'no-store',
      'Referrer-Policy': 'no-referrer',
      'X-Content-Type-Options': 'nosniff',
    })
    .type('html')
    .send(page.markup);
}
