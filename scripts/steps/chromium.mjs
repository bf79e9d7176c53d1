import { existsSync } from 'node:fs';
import { installPackages } from './debian-packages.mjs';

export const isChromiumInstalled = () => existsSync('/usr/bin/chromium');

/** Debian's Chromium: playwright-core drives it and brings no browser of its own. */
export async function ensureChromium() {
  if (!isChromiumInstalled()) await installPackages(['chromium']);
}
