import net from 'node:net';
import type { AddressInfo } from 'node:net';
import { afterEach, expect, test } from 'vitest';
import { freePort, requireFreePorts } from '#scripts/steps/ports.mjs';
import { readPorts } from '#scripts/steps/settings.mjs';
import { Refusal } from '#scripts/steps/say.mjs';

let other: net.Server | undefined;

afterEach(async () => {
  delete process.env.PORT;
  if (other) await new Promise((resolve) => other?.close(resolve));
  other = undefined;
});

async function takePort(): Promise<number> {
  const server = net.createServer();
  other = server;
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return (server.address() as AddressInfo).port;
}

test('starting, when another program has the port, says which one and how to choose another', async () => {
  const port = await takePort();
  await expect(requireFreePorts({ PORT: port })).rejects.toThrow(
    new Refusal(`Port ${port} is taken by another program: free it, or choose another one with PORT=<port>.`),
  );
});

test('starting, when every port is free, goes on', async () => {
  await expect(requireFreePorts({ PORT: await freePort(), PG_PORT: await freePort() })).resolves.toBeUndefined();
});

test('reading the ports, when PORT is a word, refuses it by name', () => {
  process.env.PORT = 'eighty';
  expect(() => readPorts()).toThrow(new Refusal('PORT=eighty is not a port: give a number from 1 to 65535.'));
});

test('reading the ports, when PORT is set, takes it and leaves the others as they are', () => {
  process.env.PORT = '9000';
  expect(readPorts()).toMatchObject({ PORT: 9000, PAYMENTS_FAKE_PORT: 8090 });
});
