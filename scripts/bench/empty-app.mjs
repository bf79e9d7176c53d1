import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { run } from '../steps/processes.mjs';
import { step } from '../steps/say.mjs';
import { dataDir, root } from '../steps/settings.mjs';
import { exportSettings, precompress } from '../steps/web-app.mjs';

const home = path.join(dataDir, 'bench/empty-app');

const screen = `import { Text } from 'react-native';

export default function Home() {
  return (
    <Text role="heading" aria-level={1}>
      Empty
    </Text>
  );
}
`;

// The packages are the project's own: the empty app lies below it, so the same versions are found on the way up.
const metro = `const { getDefaultConfig } = require('expo/metro-config');
const config = getDefaultConfig(__dirname);
config.watchFolders = [${JSON.stringify(path.join(root, 'node_modules'))}];
module.exports = config;
`;

/** Our own settings of Expo and its router, around a single screen with one heading on it. */
function filesOfApp() {
  const ours = JSON.parse(readFileSync(path.join(root, 'app.json'), 'utf8'));
  const app = { expo: { ...ours.expo, name: 'Empty', slug: 'empty', scheme: 'empty' } };
  return {
    'app.json': JSON.stringify(app, null, 2),
    'package.json': JSON.stringify({ name: 'empty', private: true, main: 'expo-router/entry' }, null, 2),
    'metro.config.js': metro,
    'tsconfig.json': JSON.stringify({ extends: 'expo/tsconfig.base' }),
    'app/index.tsx': screen,
  };
}

/** Exports an app with nothing in it, once for each set of versions. Returns the folder that holds its `dist`. */
export async function ensureEmptyApp() {
  const files = filesOfApp();
  const versions = readFileSync(path.join(root, 'package-lock.json'), 'utf8');
  const hash = createHash('sha256').update(versions).update(JSON.stringify(files)).digest('hex');
  const stamp = path.join(home, 'dist', 'made-from.sha256');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return home;
  rmSync(home, { recursive: true, force: true });
  for (const [name, text] of Object.entries(files)) {
    mkdirSync(path.dirname(path.join(home, name)), { recursive: true });
    writeFileSync(path.join(home, name), text);
  }
  await step('Building an empty app with the same versions (once)', () =>
    run(
      process.execPath,
      [path.join(root, 'node_modules/expo/bin/cli'), 'export', '-p', 'web', '--output-dir', 'dist'],
      { log: 'empty-app', env: exportSettings(), cwd: home },
    ),
  );
  await precompress(path.join(home, 'dist/client'));
  writeFileSync(stamp, hash);
  return home;
}
