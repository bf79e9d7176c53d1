// npm run screenshots: pictures of the running demo for the README, into docs/screens; npm run screenshots -- every: all
// screens on a phone and on a wide screen, into docs/screens/every. Start the demo first, with npm start.
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { everyScreen } from './screens/every-screen.mjs';
import { pictures } from './screens/pictures.mjs';
import { takePicture } from './screens/take.mjs';
import { ensureChromium } from './steps/chromium.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { onStop, program } from './steps/program.mjs';
import { Refusal, say } from './steps/say.mjs';
import { readPorts, requireNode, root } from './steps/settings.mjs';

const folder = path.join(root, 'docs/screens');

/** What is asked for by name: the README's pictures, or `every` screen in both sizes. */
function choose(wanted) {
  const isEvery = wanted[0] === 'every';
  const names = isEvery ? wanted.slice(1) : wanted;
  const list = isEvery
    ? everyScreen.map((picture) => ({ picture, file: path.join(folder, 'every', `${picture.name}.jpg`) }))
    : pictures.map((picture) => ({ picture, file: path.join(folder, `${picture.name}.png`) }));
  return list.filter(({ picture }) => names.length === 0 || names.includes(picture.name));
}

async function screenshots() {
  requireNode();
  await ensureDependencies();
  await ensureChromium();
  const origin = `http://localhost:${readPorts().PORT}`;
  const isRunning = await fetch(`${origin}/api/health`).then(
    (answer) => answer.ok,
    () => false,
  );
  if (!isRunning) throw new Refusal(`Nothing answers at ${origin}: start the demo first, with npm start.`);
  mkdirSync(path.join(folder, 'every'), { recursive: true });
  const { chromium } = await import('playwright-core');
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking'],
  });
  onStop(() => browser.close());
  const trouble = [];
  for (const wanted of choose(process.argv.slice(2))) {
    const seen = await takePicture(browser, origin, wanted);
    say(`- ${path.basename(wanted.file)}, ${seen.address}`);
    trouble.push(...seen.trouble);
  }
  if (trouble.length > 0) throw new Refusal(`The pictures are made, but pages complained:\n${trouble.join('\n')}`);
}

await program(screenshots);
