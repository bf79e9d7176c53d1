// npm run create-owner -- <arguments>: the first owner of a real deployment, in the database named by DATABASE_URL.
import { spawn } from 'node:child_process';
import { ensureDependencies } from './steps/dependencies.mjs';
import { program } from './steps/program.mjs';
import { Refusal } from './steps/say.mjs';
import { requireNode, root } from './steps/settings.mjs';

async function createOwner() {
  requireNode();
  if (!process.env.DATABASE_URL) throw new Refusal('Set DATABASE_URL to the database that the owner is to be made in.');
  await ensureDependencies();
  const args = ['--import', 'tsx', 'scripts/create-owner.ts', ...process.argv.slice(2)];
  const child = spawn(process.execPath, args, { cwd: root, stdio: 'inherit' });
  return new Promise((resolve) => child.on('exit', (code) => resolve(code ?? 1)));
}

await program(createOwner);
