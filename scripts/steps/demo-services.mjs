import { readFileSync } from 'node:fs';
import path from 'node:path';
import { say, step } from './say.mjs';
import { startService } from './services.mjs';
import { root } from './settings.mjs';

/**
 * The server and the two stand-ins for other companies, side by side: none of them needs another to start.
 * `serverFlags` go to Node before the server's program, such as --watch.
 */
export function startServices(env, serverFlags = []) {
  const programs = [
    {
      name: 'mail fake',
      args: ['--import', 'tsx', 'scripts/mail-fake/main.ts'],
      health: `http://127.0.0.1:${env.MAIL_FAKE_HTTP_PORT}/api/messages`,
    },
    {
      name: 'payments fake',
      args: ['--import', 'tsx', 'payments-fake/main.ts'],
      health: `http://127.0.0.1:${env.PAYMENTS_FAKE_PORT}/health`,
    },
    {
      name: 'server',
      args: [...serverFlags, '--import', 'tsx', 'server/main.ts'],
      health: `http://127.0.0.1:${env.PORT}/api/health`,
    },
  ];
  return step('Starting the server, the payments fake and the mail fake', () =>
    Promise.all(programs.map((program) => startService({ ...program, env }))),
  );
}

export function showAddresses(env) {
  const people = JSON.parse(readFileSync(path.join(root, 'db/seed/demo-sign-ins.json'), 'utf8'));
  const width = Math.max(...people.map((person) => person.email.length));
  say();
  say(`  Shop      ${env.PUBLIC_ORIGIN}`);
  say(`  Office    ${env.PUBLIC_ORIGIN}/office`);
  say(`  Trade     ${env.PUBLIC_ORIGIN}/trade`);
  say(`  Mailbox   http://localhost:${env.MAIL_FAKE_HTTP_PORT}`);
  say();
  say('  Sign in as');
  for (const { role, email, password } of people) say(`    ${role.padEnd(9)} ${email.padEnd(width)}  ${password}`);
  say();
  say('  Ctrl-C stops everything. "npm run reset" makes the demo farm afresh.');
}
