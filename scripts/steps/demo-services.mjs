import { readFileSync } from 'node:fs';
import path from 'node:path';
import { say } from './say.mjs';
import { startService } from './services.mjs';
import { root } from './settings.mjs';

/** The two stand-ins for other companies: the mail server with its mailbox page, and the payment company. */
export async function startFakes(env) {
  const mail = await startService({
    name: 'mail fake',
    args: ['--import', 'tsx', 'scripts/mail-fake/main.ts'],
    env,
    health: `http://127.0.0.1:${env.MAIL_FAKE_HTTP_PORT}/api/messages`,
  });
  const payments = await startService({
    name: 'payments fake',
    args: ['--import', 'tsx', 'payments-fake/main.ts'],
    env,
    health: `http://127.0.0.1:${env.PAYMENTS_FAKE_PORT}/health`,
  });
  return [mail, payments];
}

/** `flags` go to Node before the program, such as --watch. */
export function startWebServer(env, flags = []) {
  return startService({
    name: 'server',
    args: [...flags, '--import', 'tsx', 'server/main.ts'],
    env,
    health: `http://127.0.0.1:${env.PORT}/api/health`,
  });
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
