import { readFileSync } from 'node:fs';
import path from 'node:path';
import { withLock } from './lock.mjs';
import { run } from './processes.mjs';
import { step } from './say.mjs';
import { dataDir, root } from './settings.mjs';

function packagesIn(file) {
  try {
    return JSON.parse(readFileSync(path.join(root, file), 'utf8')).packages;
  } catch {
    return {};
  }
}

/** npm writes what it installed into a hidden lock file at the very end: a broken install leaves none. */
function isInstalled() {
  const installed = packagesIn('node_modules/.package-lock.json');
  return Object.entries(packagesIn('package-lock.json')).every(([name, wanted]) => {
    if (name === '' || (wanted.optional && !installed[name])) return true;
    return installed[name]?.version === wanted.version && installed[name]?.integrity === wanted.integrity;
  });
}

export async function ensureDependencies() {
  if (isInstalled()) return;
  await withLock(path.join(dataDir, 'npm.lock'), async () => {
    if (isInstalled()) return;
    await step('Installing the npm packages (a minute or two)', () =>
      run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { log: 'npm' }),
    );
  });
}
