import { createHash } from 'node:crypto';
import fs from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import type * as expoServer from 'expo-server/adapter/express';
import express, { type ErrorRequestHandler, type RequestHandler, Router } from 'express';
import { log } from './log.ts';
import { sitemap } from './sitemap.ts';
import { warmFirst } from './warm-pages.ts';

// Its module form calls `require`, which modules do not have: the CommonJS form is asked for.
const { createRequestHandler } = createRequire(import.meta.url)('expo-server/adapter/express') as typeof expoServer;

const YEAR_MS = 365 * 24 * 3_600_000;

/** The exported web app: hashed files for a year, fonts, public files, and pages rendered for each request. */
export function pages(root: string, paymentScriptUrl: string | null = null): Router {
  const client = path.join(root, 'dist', 'client');
  const router = Router();
  router.use(precompressed(client));
  router.use('/_expo/static', express.static(path.join(client, '_expo/static'), { immutable: true, maxAge: YEAR_MS }));
  router.use('/assets', express.static(path.join(client, 'assets'), { immutable: true, maxAge: YEAR_MS }));
  router.use('/fonts', express.static(path.join(root, 'fonts'), { immutable: true, maxAge: YEAR_MS }));
  router.use(sitemap(client));
  router.use(express.static(client, { index: false, maxAge: 3_600_000 }));
  const build = path.join(root, 'dist', 'server');
  router.use(
    finishPage(paymentScriptUrl === null ? null : new URL(paymentScriptUrl).origin),
    noEscapes,
    canonicalQuery,
    warmFirst(build),
  );
  router.use(createRequestHandler({ build }));
  router.use(brokenPage);
  return router;
}

/** Serves the .br or .gz that the build wrote beside a file, so that nothing is compressed twice. */
function precompressed(client: string): RequestHandler {
  const encodings = [
    ['br', '.br'],
    ['gzip', '.gz'],
  ] as const;
  return (request, response, next) => {
    if (request.method !== 'GET' || !/^\/_expo\/static\/.*\.(js|css)$/.test(request.path)) return next();
    const accepted = request.headers['accept-encoding'] ?? '';
    const found = encodings.find(
      ([name, ending]) =>
        accepted.includes(name) && fs.existsSync(path.join(client, path.normalize(request.path)) + ending),
    );
    if (!found) return next();
    response.setHeader('Content-Encoding', found[0]);
    response.setHeader('Vary', 'Accept-Encoding');
    response.type(path.extname(request.path));
    request.url += found[1];
    next();
  };
}

/** None of our addresses needs escaping, and the router loses a page's data under one that has it. */
const noEscapes: RequestHandler = (request, response, next) => {
  if (!request.path.includes('%')) return next();
  response.status(404).type('html').send(NO_SUCH_PAGE);
};

/** The router finds a page's data again by its whole address, written its own way: `a+b`, where a mail has `a%20b`. */
const canonicalQuery: RequestHandler = (request, _response, next) => {
  const at = request.url.indexOf('?');
  if (at >= 0) {
    const query = new URLSearchParams(request.url.slice(at)).toString();
    request.url = request.url.slice(0, at) + (query ? `?${query}` : '');
    request.originalUrl = request.url;
  }
  next();
};

/**
 * Holds a rendered page back until it is whole. Its status is what the page itself says it shows: a screen for a missing
 * box is a 404. Content-Security-Policy goes by hash: the router's inline scripts carry the page's data and change with it.
 */
const finishPage =
  (paymentOrigin: string | null): RequestHandler =>
  (request, response, next) => {
    const chunks: Buffer[] = [];
    const keep = (chunk: unknown): void => {
      if (typeof chunk === 'string' || chunk instanceof Uint8Array) chunks.push(Buffer.from(chunk));
    };
    const end = response.end.bind(response);
    response.write = (chunk: unknown) => {
      keep(chunk);
      return true;
    };
    response.end = ((chunk?: unknown) => {
      keep(chunk);
      const body = Buffer.concat(chunks);
      if (!response.headersSent && String(response.getHeader('content-type')).includes('text/html')) {
        const html = body.toString('utf8');
        const shown = / data-page-status="(404|503)"/.exec(html)?.[1];
        if (shown && response.statusCode === 200) {
          response.statusCode = Number(shown);
          response.statusMessage = '';
        }
        response.setHeader(
          'Content-Security-Policy',
          contentSecurityPolicy(html, PAY_PAGE.test(request.path) ? paymentOrigin : null),
        );
        response.setHeader('Cache-Control', 'no-store');
        response.setHeader('Content-Length', body.length);
      }
      return end(body);
    }) as typeof response.end;
    next();
  };

/** A page that cannot be drawn is still a page: people see no JSON. The cause goes to the log. */
// Express knows an error handler by its four parameters.
// eslint-disable-next-line max-params -- see above
const brokenPage: ErrorRequestHandler = (error, request, response, next) => {
  if (response.headersSent || !request.accepts('html')) return next(error);
  log.error({ err: error as unknown, requestId: request.id }, 'a page could not be drawn');
  response.status(500).type('html').send(BROKEN);
};

/** A page that needs nothing of the app: no script, no data. */
function plainPage(title: string, words: string): string {
  return `<!doctype html><html lang="en-GB"><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="robots" content="noindex"><title>${title}</title>
<style>body{margin:0 auto;max-width:38rem;padding:64px 20px;font:1.0625rem/1.5 system-ui,sans-serif;background:#FBF6F1;color:#1E1A18}a{color:#A8341F}@media (prefers-color-scheme:dark){body{background:#171311;color:#F4EAE0}a{color:#F0917A}}</style>
<main><h1>${title}</h1><p>${words}</p><p><a href="/">To the shop</a></p></main></html>`;
}

const BROKEN = plainPage(
  'This page did not open',
  'The fault is ours, and nothing of yours was changed. Please try again in a minute.',
);
const NO_SUCH_PAGE = plainPage('There is no such page', 'The address may have been typed wrongly.');

/** The one page on which the payment company's own script runs. */
const PAY_PAGE = /^\/orders\/[^/]+\/pay$/;

function contentSecurityPolicy(html: string, paymentOrigin: string | null): string {
  const inline = [...html.matchAll(/<script(?![^>]*\ssrc=)[^>]*>([\s\S]*?)<\/script>/g)].map((match) => match[1] ?? '');
  const hashes = inline.map((script) => `'sha256-${createHash('sha256').update(script).digest('base64')}'`);
  return [
    "default-src 'self'",
    `script-src 'self' ${[...(paymentOrigin ? [paymentOrigin] : []), ...hashes].join(' ')}`,
    ...(paymentOrigin
      ? [
          `connect-src 'self' ${paymentOrigin} https://api.stripe.com`,
          `frame-src ${paymentOrigin} https://hooks.stripe.com`,
        ]
      : []),
    // React Native Web writes its rules into style elements.
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
    "form-action 'self'",
  ].join('; ');
}
