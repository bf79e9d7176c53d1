import { setTimeout as pause } from 'node:timers/promises';

const rounds = 5;
const requestsOfRound = 120;
/** Milliseconds between two requests: a visitor now and then, not a flood. */
const rest = 10;

async function ask(url) {
  const startedAt = performance.now();
  const answer = await fetch(url);
  await answer.arrayBuffer();
  if (!answer.ok) throw new Error(`${url} answered ${answer.status}: this is no measure.`);
  return performance.now() - startedAt;
}

function p95(times) {
  return times.toSorted((a, b) => a - b)[Math.floor(times.length * 0.95)];
}

async function askRound(url) {
  const times = [];
  for (let request = 0; request < requestsOfRound; request += 1) {
    times.push(await ask(url));
    await pause(rest);
  }
  return times;
}

/** Rounds at rest and at work take turns, so that a slow minute of the machine falls on both. */
export async function measureBusy(shop, control) {
  const paths = ['/api/health', '/api/shop'];
  const rows = [];
  for (const path of paths) {
    await askRound(`${shop}${path}`);
    const seen = { idle: [], busy: [] };
    for (let round = 0; round < rounds; round += 1) {
      for (const state of ['idle', 'busy']) {
        await fetch(`${control}/${state}`);
        seen[state].push(...(await askRound(`${shop}${path}`)));
      }
    }
    await fetch(`${control}/idle`);
    const [idle, busy] = [p95(seen.idle), p95(seen.busy)];
    rows.push({
      request: `GET ${path}`,
      'p95 idle, ms': idle.toFixed(1),
      'p95 while solving, ms': busy.toFixed(1),
      ratio: (busy / idle).toFixed(2),
    });
  }
  return rows;
}
