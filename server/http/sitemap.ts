import fs from 'node:fs';
import path from 'node:path';
import { type Request, Router } from 'express';

/** What search engines are told: the pages that anyone may find, boxes included, and where nobody needs to look. */
export function sitemap(client: string): Router {
  const router = Router();
  router.get('/sitemap.xml', async (request, response) => {
    const slugs = await listBoxes(request);
    const pages = ['/', '/cuts', ...slugs.map((slug) => `/boxes/${encodeURIComponent(slug)}`)];
    const urls = pages.map((page) => `<url><loc>${escapeXml(originOf(request) + page)}</loc></url>`);
    response
      .type('application/xml')
      .send(
        `<?xml version="1.0" encoding="UTF-8"?>\n<urlset xmlns="http://www.sitemaps.org/schemas/sitemap/0.9">\n${urls.join('\n')}\n</urlset>\n`,
      );
  });
  router.get('/robots.txt', (request, response) => {
    const file = path.join(client, 'robots.txt');
    const rules = fs.existsSync(file) ? fs.readFileSync(file, 'utf8').trimEnd() : 'User-agent: *';
    response.type('text/plain').send(`${rules}\n\nSitemap: ${originOf(request)}/sitemap.xml\n`);
  });
  return router;
}

async function listBoxes(request: Request): Promise<string[]> {
  const response = await fetch(`http://127.0.0.1:${request.socket.localPort}/api/shop`);
  if (!response.ok) return [];
  const { boxes } = (await response.json()) as { boxes: { slug: string }[] };
  return boxes.map(({ slug }) => slug);
}

function originOf(request: Request): string {
  return `${request.protocol}://${request.get('host') ?? ''}`;
}

function escapeXml(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}
