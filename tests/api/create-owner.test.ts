import { spawnSync } from 'node:child_process';
import path from 'node:path';
import supertest from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { startWorld, type World } from '#tests/support/harness.ts';

const root = path.join(import.meta.dirname, '../..');
const PASSWORD = 'a long enough password';
const FARM = [
  ['--farm', 'Hag End'],
  ['--address', 'Hag End; Nether Moor; ZZ9 9AA'],
  ['--phone', '01632 960900'],
  ['--abattoir', 'Rowan Hill Abattoir; ZZ 0001'],
  ['--cutter', 'Rowan Hill Cutting; ZZ 0002'],
].flat();

let world: World;
beforeAll(async () => {
  world = await startWorld();
});
afterAll(() => world.stop());

function createOwner(...args: string[]) {
  return spawnSync(process.execPath, ['--import', 'tsx', 'scripts/create-owner.ts', ...args], {
    cwd: root,
    env: { ...process.env, DATABASE_URL: world.databaseUrl, OWNER_PASSWORD: PASSWORD },
    encoding: 'utf8',
  });
}

test(
  'the first owner needs the farm, is made with it, can sign in, and is not made twice',
  { timeout: 180_000 },
  async () => {
    const me = ['--email', 'Jo@example.com', '--name', 'Jo Hag'];
    const without = createOwner(...me);
    expect(without.status).toBe(1);
    expect(without.stderr).toContain('--farm');

    const made = createOwner(...me, ...FARM);
    expect(made.stderr).toBe('');
    expect(made.status).toBe(0);
    const answer = await supertest(world.origin)
      .post('/api/auth/sign-in/email')
      .set('Origin', world.origin)
      .send({ email: 'jo@example.com', password: PASSWORD })
      .expect(200);
    const cookie = (answer.headers['set-cookie'] as unknown as string[]).map((each) => each.split(';')[0]).join('; ');
    const owner = world.request(cookie);
    expect((await owner.get('/api/me').expect(200)).body).toMatchObject({ user: { role: 'owner', name: 'Jo Hag' } });
    const { specifications } = (await owner.get('/api/specifications').expect(200)).body as {
      specifications: unknown[];
    };
    expect(specifications).toHaveLength(1);

    const again = createOwner(...me);
    expect(again.status).toBe(1);
    expect(again.stderr).toContain('has an account already');
  },
);

test('a mistyped argument is answered with what the command takes', { timeout: 120_000 }, () => {
  const answer = createOwner('--mail', 'jo@example.com');
  expect(answer.status).toBe(1);
  expect(answer.stderr).toContain('npm run create-owner');
  expect(answer.stderr).not.toContain('    at ');
});
