import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { listHerd } from '#server/herd/herd-service.ts';
import { seedDemoFarm } from '#scripts/demo/seed-demo-farm.ts';
import { startWorld, type World } from '#tests/support/harness.ts';

let world: World;

beforeAll(async () => {
  world = await startWorld();
  await seedDemoFarm(world.deps);
}, 180_000);
afterAll(() => world.stop());

describe('the demo farm', () => {
  test('has a herd of about 140', async () => {
    const herd = await listHerd(world.deps);
    expect(herd.length).toBeGreaterThanOrEqual(135);
    expect(herd.length).toBeLessThanOrEqual(145);
  });
});
