import express from 'express';
import request from 'supertest';
import { expect, test } from 'vitest';
import { oneLoopbackName } from '#server/http/guards.ts';

function ask(origin: string, host: string) {
  const app = express();
  app.use(oneLoopbackName(origin), (_request, response) => void response.send('page'));
  return request(app).get('/basket?from=mail').set('Host', host);
}

test('a page, when asked for by the other name of this machine, is looked up at the one that cookies know', async () => {
  const answer = await ask('http://localhost:8080', '127.0.0.1:8080');
  expect(answer.status).toBe(307);
  expect(answer.headers.location).toBe('http://localhost:8080/basket?from=mail');
});

test.each([
  ['http://localhost:8080', 'localhost:8080'],
  ['http://localhost:8080', '127.0.0.1:9999'],
  ['https://shop.example.com', '127.0.0.1:8080'],
  ['http://localhost:8080', 'shop.example.com'],
])('a page of %s, when asked for as %s, is answered where it is', async (origin, host) => {
  const answer = await ask(origin, host);
  expect(answer.text).toBe('page');
});
