import { run } from '../steps/processes.mjs';
import { runServer } from './servers.mjs';

const connections = 20;
const secondsOfRound = 4;
const rounds = 3;

/** Answers a second over one round; a round with a refused or lost request is no measure. */
async function load(url) {
  const args = ['-j', '-c', String(connections), '-d', String(secondsOfRound), url];
  const output = await run(process.execPath, ['node_modules/autocannon/autocannon.js', ...args], { log: 'bench-load' });
  const result = JSON.parse(output.slice(output.indexOf('{')));
  if (result.non2xx > 0 || result.errors > 0) {
    throw new Error(`${url} refused ${result.non2xx} requests and lost ${result.errors}: this is no measure.`);
  }
  return result.requests.average;
}

const median = (numbers) => numbers.toSorted((a, b) => a - b)[Math.floor(numbers.length / 2)];

/** Rounds take turns, so that a slow minute of the machine falls on both. */
export async function measureBoxList(shop, databaseUrl) {
  const raw = await runServer('raw', ['scripts/bench/raw-server.mjs'], { DATABASE_URL: databaseUrl });
  try {
    const targets = { list: `${shop}/api/shop`, bare: raw.url };
    const seen = { list: [], bare: [] };
    // The first answers compile and connect: they are asked for and not counted.
    for (const url of Object.values(targets)) await load(url);
    for (let round = 0; round < rounds; round += 1) {
      for (const [name, url] of Object.entries(targets)) seen[name].push(await load(url));
    }
    const [list, bare] = [median(seen.list), median(seen.bare)];
    return { list, bare, ratio: list / bare };
  } finally {
    await raw.stop();
  }
}
