import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';
import { withLock } from './lock.mjs';
import { run } from './processes.mjs';
import { step } from './say.mjs';
import { dataDir, root } from './settings.mjs';

const sources = ['app', 'components', 'hooks', 'shared', 'fonts', 'assets', 'scripts/patches'];
const settings = ['app.json', 'package.json', 'package-lock.json', 'metro.config.js', 'tsconfig.json'];
const dist = path.join(root, 'dist');
const stamp = path.join(dist, 'sources.sha256');
const day = 24 * 3_600_000;

function filesUnder(folder) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => path.join(entry.parentPath, entry.name))
    .sort();
}

function hashOfSources() {
  const hash = createHash('sha256');
  const files = [
    ...sources.flatMap((name) => filesUnder(path.join(root, name))),
    ...settings.map((name) => path.join(root, name)),
  ];
  for (const file of files) hash.update(path.relative(root, file)).update('\0').update(readFileSync(file)).update('\0');
  return hash.digest('hex');
}

const isBuilt = (hash) => existsSync(stamp) && readFileSync(stamp, 'utf8') === hash;

/** Writes .br and .gz beside each script and style sheet, so that the server never compresses a static file twice. */
export async function precompress(folder) {
  const brotli = promisify(brotliCompress);
  const squeeze = promisify(gzip);
  const files = filesUnder(folder).filter((file) => /\.(js|css)$/.test(file));
  await Promise.all(
    files.map(async (file) => {
      const plain = readFileSync(file);
      if (plain.length < 1024) return;
      const quality = {
        params: { [constants.BROTLI_PARAM_QUALITY]: 11, [constants.BROTLI_PARAM_SIZE_HINT]: plain.length },
      };
      writeFileSync(`${file}.br`, await brotli(plain, quality));
      writeFileSync(`${file}.gz`, await squeeze(plain, { level: 9 }));
    }),
  );
}

/** The environment of an export: offline, without telemetry, and with nobody at a keyboard. */
export const exportSettings = () => ({
  ...process.env,
  NODE_ENV: 'production',
  EXPO_PUBLIC_FOLDER: 'assets/public',
  EXPO_OFFLINE: '1',
  EXPO_NO_TELEMETRY: '1',
  CI: '1',
});

/**
 * Scripts of the build before go on being there for a day: a page that is open in a browser, or a server that was started
 * before, still asks for them by their old names.
 */
function keepRecentScripts(fresh) {
  const folder = 'client/_expo/static';
  for (const file of filesUnder(path.join(dist, folder))) {
    const kept = path.join(fresh, path.relative(dist, file));
    if (existsSync(kept) || Date.now() - statSync(file).mtimeMs > day) continue;
    mkdirSync(path.dirname(kept), { recursive: true });
    renameSync(file, kept);
  }
}

async function build(hash) {
  const fresh = path.join(root, `dist-${process.pid}`);
  const expo = path.join(root, 'node_modules/expo/bin/cli');
  try {
    await run(process.execPath, [expo, 'export', '-p', 'web', '--output-dir', path.basename(fresh)], {
      log: 'web-app',
      env: exportSettings(),
    });
    await precompress(path.join(fresh, 'client'));
    // The renderer is CommonJS, while the project's own package.json says that a .js file is a module.
    writeFileSync(path.join(fresh, 'server/package.json'), '{ "type": "commonjs" }\n');
    writeFileSync(path.join(fresh, path.basename(stamp)), hash);
    keepRecentScripts(fresh);
    rmSync(dist, { recursive: true, force: true });
    renameSync(fresh, dist);
  } finally {
    rmSync(fresh, { recursive: true, force: true });
  }
}

/** Exports the web app to dist/, unless what stands there was made from the same sources. */
export async function ensureWebApp() {
  if (isBuilt(hashOfSources())) return;
  await withLock(path.join(dataDir, 'web-app.lock'), async () => {
    const hash = hashOfSources();
    if (!isBuilt(hash)) await step('Building the web app (a minute or two the first time)', () => build(hash));
  });
}
