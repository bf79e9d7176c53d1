import { afterEach, expect, test } from 'vitest';
import { sentenceFor } from '#scripts/steps/program.mjs';
import { demoEnvironment, readPorts } from '#scripts/steps/settings.mjs';

const theirs = { STRIPE_SECRET_KEY: 'sk_live_of_a_shop', DATABASE_URL: 'postgres://elsewhere/real' };

afterEach(() => {
  for (const name of Object.keys(theirs)) delete process.env[name];
});

test('the demo, when the shell holds a real key and a real database, uses neither', () => {
  Object.assign(process.env, theirs);
  const env = demoEnvironment({ ports: readPorts(), databaseUrl: 'postgres://127.0.0.1/demo' });
  expect(env.STRIPE_SECRET_KEY).toMatch(/^sk_test_[0-9a-f]{64}$/);
  expect(env.DATABASE_URL).toBe('postgres://127.0.0.1/demo');
  expect(env.STRIPE_API_HOST).toBe('127.0.0.1');
});

test('a missing right, when a script meets it, becomes one sentence without a stack', () => {
  const sentence = sentenceFor(Object.assign(new Error('nope'), { code: 'EACCES', path: '/srv/farm' }));
  expect(sentence).toContain('This user may not use /srv/farm');
  expect(sentence).not.toContain('\n');
});
