import { launch } from 'chrome-launcher';
import lighthouse from 'lighthouse';
import { say } from '../steps/say.mjs';
import { ensureEmptyApp } from './empty-app.mjs';
import { runServer } from './servers.mjs';

const rounds = 7;
const categories = ['performance', 'accessibility', 'best-practices', 'seo'];
const chromeFlags = ['--headless=new', '--no-sandbox', '--disable-gpu', '--no-first-run'];

const median = (numbers) => numbers.toSorted((a, b) => a - b)[Math.floor(numbers.length / 2)];

/** One visit of a cheap phone, by Lighthouse's own mobile settings. Scores are 0 to 1. */
async function visit(port, url) {
  const { lhr } = await lighthouse(url, { port, onlyCategories: categories, logLevel: 'silent' });
  if (lhr.runtimeError) throw new Error(`${url}: ${lhr.runtimeError.message}`);
  const refs = categories.slice(1).flatMap((id) => lhr.categories[id].auditRefs);
  return {
    scores: Object.fromEntries(categories.map((id) => [id, lhr.categories[id].score])),
    paintMs: lhr.audits['largest-contentful-paint'].numericValue,
    shift: lhr.audits['cumulative-layout-shift'].numericValue,
    faults: refs.filter(({ id, weight }) => weight > 0 && lhr.audits[id].score === 0).map(({ id }) => id),
  };
}

/** Pages take turns within each round, so that a slow minute of the machine falls on all. */
async function visitInTurns(port, pages) {
  const visits = new Map(Object.keys(pages).map((name) => [name, []]));
  for (let round = 1; round <= rounds; round += 1) {
    for (const [name, url] of Object.entries(pages)) visits.get(name).push(await visit(port, url));
    say(`- Lighthouse, round ${round} of ${rounds}`);
  }
  return visits;
}

function summarise(visits, floor) {
  const score = (id, of = visits) => median(of.map(({ scores }) => scores[id]));
  const paint = (of) => median(of.map(({ paintMs }) => paintMs));
  return {
    'performance of the floor': (score('performance') / score('performance', floor)).toFixed(2),
    performance: score('performance'),
    accessibility: score('accessibility'),
    'best practices': score('best-practices'),
    seo: score('seo'),
    'largest paint of the floor': (paint(visits) / paint(floor)).toFixed(2),
    'largest paint, ms': Math.round(paint(visits)),
    'layout shift': median(visits.map(({ shift }) => shift)).toFixed(3),
    faults: [...new Set(visits.flatMap(({ faults }) => faults))].join(' '),
  };
}

/** The shop's first page and a box against a page with one heading, each the median of its rounds. */
export async function measureLighthouse(shop) {
  const empty = await runServer('empty-app', ['--import', 'tsx', 'scripts/bench/empty-server.ts'], {
    EMPTY_APP: await ensureEmptyApp(),
  });
  const chrome = await launch({ chromePath: '/usr/bin/chromium', chromeFlags, logLevel: 'silent' });
  try {
    const visits = await visitInTurns(chrome.port, {
      'one heading': empty.url,
      'first page': shop,
      box: `${shop}/boxes/table`,
    });
    const floor = visits.get('one heading');
    return Object.fromEntries([...visits].map(([name, of]) => [name, summarise(of, floor)]));
  } finally {
    await chrome.kill();
    await empty.stop();
  }
}
