import { createRequire } from 'node:module';
import http from 'node:http';
import path from 'node:path';

const { getDefaultConfig } = createRequire(import.meta.url)('expo/metro-config');
const root = import.meta.dirname;
const config = getDefaultConfig(root);

// Anchored to the project: an unanchored pattern would block packages' own folders of the same names.
const closed = ['server', 'db', 'payments-fake', 'scripts', 'tests', 'coverage', '.data'];
const escaped = root.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
config.resolver.blockList = [
  new RegExp(`^${escaped}${path.sep}(${closed.join('|').replace('.', '\\.')})${path.sep}`),
  new RegExp(`^${escaped}${path.sep}dist[^${path.sep}]*${path.sep}`),
];
config.resolver.assetExts.push('woff2');
// Metro's cache lies in the system's temporary folder and is shared by all checkouts, but a transformed route names its
// file by its whole path: with another checkout's entry the export would leave that route's loader out.
config.cacheVersion = root;

// In development the browser talks to one origin: Metro passes the API and the fonts on to the server.
const apiPort = Number(process.env.PORT ?? 8080);
config.server.enhanceMiddleware = (metro) => (request, response, next) => {
  if (!/^\/(api|fonts)\//.test(request.url ?? '')) return metro(request, response, next);
  const upstream = http.request(
    { host: '127.0.0.1', port: apiPort, path: request.url, method: request.method, headers: request.headers },
    (answer) => {
      response.writeHead(answer.statusCode ?? 502, answer.headers);
      answer.pipe(response);
    },
  );
  upstream.on('error', () => {
    response.writeHead(502).end('The API is not running yet.');
  });
  request.pipe(upstream);
};

export default config;
