// npm test: everything the tests need, then vitest, then one line with the outcome.
// npm test -- unit runs one project (unit, api, browser); any other word goes to vitest as a filter on file names.
import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensurePostgres, isPostgresInstalled } from './postgres.mjs';
import { isChromiumInstalled } from './steps/chromium.mjs';
import { asRoot, installPackages } from './steps/debian-packages.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { identify, stopProcess } from './steps/processes.mjs';
import { isStopping, onStop, program, sentenceFor } from './steps/program.mjs';
import { say, step } from './steps/say.mjs';
import { dataDir, requireNode, root } from './steps/settings.mjs';
import { missingSolvers } from './steps/solvers.mjs';
import { startTestCluster } from './steps/test-cluster.mjs';
import { ensureWebApp } from './steps/web-app.mjs';

const allProjects = ['unit', 'api', 'browser'];

/** `npm test -- api` names a project; `npm test -- tests/unit/money` names one through its folder. */
function chooseProjects(words) {
  const filters = words.filter((word) => !allProjects.includes(word));
  const folders = filters.map((word) => /^(?:\.\/)?tests\/([a-z]+)\//.exec(word)?.[1]);
  const named = words.filter((word) => allProjects.includes(word));
  if (named.length > 0) return { projects: named, filters };
  const isByFolder = folders.length > 0 && folders.every((folder) => allProjects.includes(folder));
  return { projects: isByFolder ? [...new Set(folders)] : allProjects, filters };
}

async function ensurePrograms(projects, needsDatabase) {
  const missing = projects.includes('unit') ? missingSolvers() : [];
  if (projects.includes('browser') && !isChromiumInstalled()) missing.push('chromium');
  const lacksPostgres = needsDatabase && !isPostgresInstalled();
  const all = lacksPostgres ? [...missing, 'postgresql'] : missing;
  // Asked for all of them at once, so that one instruction names everything.
  if (all.length > 0) asRoot(all);
  if (lacksPostgres) await ensurePostgres();
  if (missing.length > 0) await installPackages(missing);
}

async function runVitest({ projects, filters, env, report }) {
  const args = [
    'node_modules/vitest/vitest.mjs',
    'run',
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  args.push(...projects.map((name) => `--project=${name}`), ...filters);
  const child = spawn(process.execPath, args, { cwd: root, env, stdio: 'inherit' });
  const identity = identify(child.pid);
  onStop(() => stopProcess(identity));
  return new Promise((resolve) => child.on('exit', (code) => resolve(code ?? 1)));
}

/** Counts a file that could not be loaded, and a run that ended badly without a failed test, as one failure each. */
function readOutcome(report, code) {
  if (!existsSync(report)) return { passed: 0, failed: 1 };
  const { numPassedTests: passed, numFailedTests, testResults } = JSON.parse(readFileSync(report, 'utf8'));
  const unloadable = testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.every((test) => test.status !== 'failed'),
  );
  const failed = numFailedTests + unloadable.length;
  const isBad = code !== 0 || passed + failed === 0;
  if (isBad && failed === 0) say(`vitest ended with ${code} after ${passed} passed tests: that counts as a failure.`);
  return { passed, failed: isBad ? Math.max(1, failed) : failed };
}

async function runTests() {
  requireNode();
  const { projects, filters } = chooseProjects(process.argv.slice(2));
  const needsDatabase = projects.some((name) => name !== 'unit');
  await ensurePrograms(projects, needsDatabase);
  await ensureDependencies();
  const env = { ...process.env, NODE_ENV: 'test' };
  if (needsDatabase) {
    const cluster = await step('Starting a PostgreSQL server for the tests', startTestCluster);
    env.TEST_DATABASE_URL = cluster.url('postgres');
  }
  if (projects.includes('browser')) await ensureWebApp();
  const report = path.join(dataDir, `test-report-${process.pid}.json`);
  mkdirSync(dataDir, { recursive: true });
  onStop(() => rmSync(report, { force: true }));
  const code = await runVitest({ projects, filters, env, report });
  return readOutcome(report, code);
}

let outcome = { passed: 0, failed: 1 };
process.on('exit', () => process.stdout.write(`tests: ${outcome.passed} passed, ${outcome.failed} failed\n`));

await program(async () => {
  try {
    outcome = await runTests();
  } catch (error) {
    if (!isStopping()) say(sentenceFor(error));
  }
  return outcome.failed === 0 ? 0 : 1;
});
