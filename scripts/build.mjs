// npm run build: exports the web app to dist/ when its sources have changed.
import { ensureDependencies } from './steps/dependencies.mjs';
import { program } from './steps/program.mjs';
import { say } from './steps/say.mjs';
import { requireNode } from './steps/settings.mjs';
import { ensureWebApp } from './steps/web-app.mjs';

async function build() {
  requireNode();
  await ensureDependencies();
  await ensureWebApp();
  say('The web app in dist/ is up to date.');
}

await program(build);
