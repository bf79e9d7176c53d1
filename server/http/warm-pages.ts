import fs from 'node:fs';
import path from 'node:path';
import type { RequestHandler } from 'express';

const WARMING = 'x-warming';

/**
 * The first time that a process draws a screen, the page lacks rules for the elements that the screen brought along, and
 * would jump once they arrive. The shop's screens are drawn once for nobody before the first visitor is answered.
 */
export function warmFirst(build: string): RequestHandler {
  let warmed: Promise<unknown> | undefined;
  return (request, _response, next) => {
    const port = request.socket.localPort;
    if (request.headers[WARMING] || port === undefined) return next();
    warmed ??= warm(`http://127.0.0.1:${port}`, build);
    void warmed.then(() => next());
  };
}

async function warm(origin: string, build: string): Promise<void> {
  const slug = await firstBox(origin);
  for (const page of shopPages(build)) {
    const address = page
      .replace(/^\/\(shop\)/, '')
      .replace(/\/index$/, '')
      .replace('[slug]', slug)
      .replace(/\[\w+\]/, 'none-such');
    // A screen that fails now fails for its visitor too, who is told then.
    await fetch(`${origin}${address || '/'}`, { headers: { [WARMING]: '1' } }).catch(() => undefined);
  }
}

/** The ready state of a box's page has more on it than the missing one. */
async function firstBox(origin: string): Promise<string> {
  try {
    const response = await fetch(`${origin}/api/shop`, { headers: { [WARMING]: '1' } });
    const { boxes } = (await response.json()) as { boxes?: { slug: string }[] };
    return boxes?.[0]?.slug ?? 'none-such';
  } catch {
    return 'none-such';
  }
}

/** The shop's screens, as the export lists them: `/(shop)/boxes/[slug]`. */
function shopPages(build: string): string[] {
  const list = path.join(build, '_expo', 'routes.json');
  if (!fs.existsSync(list)) return [];
  const { htmlRoutes } = JSON.parse(fs.readFileSync(list, 'utf8')) as { htmlRoutes?: { page: string }[] };
  return (htmlRoutes ?? []).map(({ page }) => page).filter((page) => page.startsWith('/(shop)'));
}
