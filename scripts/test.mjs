/**
 * `npm test`: everything that must hold. Sets up what is missing, starts a throw-away PostgreSQL
 * and Redis, goes through all stages even when one fails, and closes with one line of counts.
 *
 *     npm test                               everything
 *     npm test -- unit dom                   some stages
 *     npm test -- unit tests/unit/algebra    some files of a stage
 */
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildClient, buildNode } from './operate/build.mjs';
import { Fault, report } from './operate/fault.mjs';
import { ROOT } from './operate/folder.mjs';
import { requireNode } from './operate/packages.mjs';
import { endAll, run, start } from './operate/process.mjs';
import { say, step } from './operate/say.mjs';
import { ensureEverything, throwAwayServices } from './operate/services.mjs';

/** Checks that look at the sources only; each counts as one test. */
const CHECKS = {
  types: { title: 'Checking the types', program: 'typescript/bin/tsc', parameters: ['--noEmit'] },
  lint: {
    title: 'Linting',
    program: 'eslint/bin/eslint.js',
    parameters: ['.', '--max-warnings=-1', '--quiet'],
  },
  format: {
    title: 'Checking the format',
    program: 'prettier/bin/prettier.cjs',
    parameters: ['--check', '--log-level', 'warn', '.'],
  },
};

/** Projects of vitest; what they stand on. */
const PROJECTS = {
  unit: { services: false, browser: false },
  dom: { services: false, browser: false },
  api: { services: true, browser: false },
  browser: { services: true, browser: true },
};

const STAGES = [...Object.keys(CHECKS), ...Object.keys(PROJECTS)];

/** @type {{ stop: () => Promise<void> } | undefined} */
let services;
const reports = mkdtempSync(join(tmpdir(), 'massieu-report-'));

async function cleanUp() {
  await endAll();
  await services?.stop();
  rmSync(reports, { recursive: true, force: true });
}

function chosen(words) {
  const isFilter = (word) => word.includes('/') || word.includes('.');
  const unknown = words.filter((word) => !isFilter(word) && !STAGES.includes(word));
  if (unknown.length > 0) {
    throw new Fault(`There is no stage '${unknown[0]}'.`, `The stages are ${STAGES.join(', ')}.`);
  }
  const stages = words.filter((word) => STAGES.includes(word));
  const filters = words.filter(isFilter);
  const all = filters.length > 0 ? Object.keys(PROJECTS) : STAGES;
  return { stages: stages.length > 0 ? stages : all, filters };
}

/** Run one static check; its words are shown when it fails. */
async function check({ title, program, parameters }) {
  try {
    await step(title, () =>
      run(process.execPath, [join(ROOT, 'node_modules', program), ...parameters], {
        cwd: ROOT,
        fails: (_, output) => new Fault(title, output.trimEnd()),
      }),
    );
    return { passed: 1, failed: 0, skipped: 0 };
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    say(error.wayOut);
    return { passed: 0, failed: 1, skipped: 0 };
  }
}

/** Counts of a report of vitest. A file that fails outside its tests counts as one failure. */
function countsOf(path, status) {
  const counts = { passed: 0, failed: 0, skipped: 0 };
  let files = [];
  try {
    files = JSON.parse(readFileSync(path, 'utf8')).testResults;
  } catch {
    // Without a report the run itself has failed; counted below.
  }
  for (const file of files) {
    let failedHere = 0;
    for (const { status: outcome } of file.assertionResults) {
      if (outcome === 'passed') counts.passed += 1;
      else if (outcome === 'failed') failedHere += 1;
      else counts.skipped += 1;
    }
    counts.failed += file.status === 'failed' ? Math.max(1, failedHere) : failedHere;
  }
  if (status !== 0 && counts.failed === 0) counts.failed = 1;
  return counts;
}

/** Run one project of vitest with its own words on the screen. */
async function project(name, filters, environment) {
  say(`  Running the ${name} tests`);
  const output = join(reports, `${name}.json`);
  const child = start(
    process.execPath,
    [
      join(ROOT, 'node_modules/vitest/vitest.mjs'),
      'run',
      `--project=${name}`,
      '--passWithNoTests',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${output}`,
      ...filters,
    ],
    { cwd: ROOT, env: environment, stdio: ['ignore', 'inherit', 'inherit'] },
  );
  const status = await new Promise((resolve) => {
    child.once('error', () => resolve(1));
    child.once('exit', (code) => resolve(code ?? 1));
  });
  return countsOf(output, status);
}

async function main() {
  requireNode();
  const { stages, filters } = chosen(process.argv.slice(2));
  const wanted = Object.keys(PROJECTS).filter((name) => stages.includes(name));
  const needsServices = wanted.some((name) => PROJECTS[name].services);
  const needsBrowser = wanted.some((name) => PROJECTS[name].browser);
  const { TEST_DATABASE_URL, TEST_REDIS_URL } = process.env;
  const given = Boolean(TEST_DATABASE_URL && TEST_REDIS_URL);
  await ensureEverything({
    postgres: needsServices && !given,
    redis: needsServices && !given,
    chromium: needsBrowser,
  });

  const total = { passed: 0, failed: 0, skipped: 0 };
  const failures = [];
  const add = (name, counts) => {
    for (const key of Object.keys(total)) total[key] += counts[key];
    if (counts.failed > 0) failures.push(name);
  };

  const checks = Object.keys(CHECKS).filter((name) => stages.includes(name));
  const outcomes = await Promise.all(checks.map((name) => check(CHECKS[name])));
  checks.forEach((name, index) => add(name, outcomes[index]));

  let environment = { ...process.env, NODE_ENV: 'test' };
  if (needsServices && !given) {
    services = await throwAwayServices();
    environment = {
      ...environment,
      TEST_DATABASE_URL: services.databaseUrl,
      TEST_REDIS_URL: services.redisUrl,
    };
  }
  for (const name of wanted) {
    if (PROJECTS[name].browser) {
      try {
        await step('Building the application', async () => {
          await buildNode();
          await buildClient();
        });
      } catch (error) {
        report(error, 'The browser tests cannot run');
        add(name, { passed: 0, failed: 1, skipped: 0 });
        continue;
      }
    }
    add(name, await project(name, filters, environment));
  }
  await cleanUp();
  if (failures.length > 0) say(`\nFailed: ${failures.join(', ')}`);
  say(`${total.passed} passed, ${total.failed} failed, ${total.skipped} skipped`);
  process.exitCode = total.failed === 0 ? 0 : 1;
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => void cleanUp().then(() => process.exit(1)));
}
main().catch(async (error) => {
  await cleanUp();
  report(error, 'The tests could not run');
  say('0 passed, 1 failed, 0 skipped');
  process.exit(1);
});
