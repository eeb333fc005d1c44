/**
 * Everything the project promises, from nothing: packages, a throwaway database, a browser, a build, the
 * app; then lint, types, the OpenAPI document and all tests. The last line is `N passed, N failed`.
 *
 *   --fast   without database, app and browser
 *   other words go to the test runner: npm test -- tests/api/keys.test.ts
 */
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { provideBrowser } from './browser.mjs';
import { installPackages } from './packages.mjs';
import { endRunning, repository, run, whenToldToStop } from './processes.mjs';
import { interruptStep, reportFailure, step, StepFailure } from './steps.mjs';
import { prepareTrial, trialDist } from './trial.mjs';

const words = process.argv.slice(2).filter((word) => word !== '--fast');
const isFast = process.argv.includes('--fast');

let passed = 0;
let failed = 0;
let told = false;
const undone = [];

whenToldToStop(async () => {
  told = true;
  const left = interruptStep();
  await endRunning();
  await left;
  await clearUp();
  process.exit(130);
});

async function clearUp() {
  while (undone.length > 0) {
    try {
      await undone.pop()();
    } catch (error) {
      reportFailure(error);
    }
  }
}

/** Once told to stop, nothing more begins. */
function advance(name, work) {
  return told ? new Promise(() => {}) : step(name, work);
}

/** A step that must succeed for the rest to make sense; a failure counts as one, and is told at once. */
async function attempt(name, work) {
  try {
    return { result: await advance(name, work) };
  } catch (error) {
    if (told) return new Promise(() => {});
    reportFailure(error);
    failed += 1;
    return null;
  }
}

async function check(name, program, programWords, environment) {
  const outcome = await attempt(name, async () => {
    const { code, output } = await run(program, programWords, { env: environment });
    if (code !== 0) throw new StepFailure(`${name} found something wrong.`, output);
    return 'passed';
  });
  if (outcome) passed += 1;
}

// ---------------------------------------------------------------------------------------------------

const inModules = (file) => path.join(repository, 'node_modules', file);

async function checkSources(environment) {
  await check('lint', process.execPath, [inModules('eslint/bin/eslint.js'), '.'], environment);
  await check('types', process.execPath, [inModules('typescript/bin/tsc'), '--noEmit'], environment);
  await check('openapi', 'npm', ['run', '--silent', 'openapi:lint'], environment);
}

/** The framework writes the types of routes and assets; a build does it by the way, without one it is asked to. */
async function writeRouteTypes() {
  const { code, output } = await run(process.execPath, [inModules('next/dist/bin/next'), 'typegen'], {
    env: { ...process.env, NEXT_DIST_DIR: trialDist, NEXT_TELEMETRY_DISABLED: '1' },
  });
  if (code !== 0) throw new StepFailure('The types of the routes could not be written.', output);
  return 'written';
}

async function runTests(environment, options) {
  const report = path.join(fs.mkdtempSync(path.join(os.tmpdir(), 'linewright-report-')), 'vitest.json');
  undone.push(() => fs.rmSync(path.dirname(report), { recursive: true, force: true }));
  console.log('  tests');
  const { code } = await run(
    process.execPath,
    [inModules('vitest/vitest.mjs'), 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...options, ...words],
    { env: environment, echo: true },
  );
  if (told) return new Promise(() => {});
  return count(code, report);
}

function count(code, report) {
  if (!fs.existsSync(report)) {
    console.error(`The tests did not come to an end (exit code ${code}).`);
    failed += 1;
    return;
  }
  const { numPassedTests, numFailedTests, numPendingTests, numTotalTests, testResults } = JSON.parse(fs.readFileSync(report, 'utf8'));
  // A file that could not be loaded, or whose preparation failed, has no failed test to show for it.
  const brokenFiles = testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && !assertionResults.some((test) => test.status === 'failed'),
  );
  passed += numPassedTests;
  failed += numFailedTests + brokenFiles.length;
  if (numPendingTests > 0) console.log(`${numPendingTests} tests were not run`);
  if (numTotalTests === 0 && brokenFiles.length === 0) {
    console.error('No test was found.');
    failed += 1;
  } else if (code !== 0 && numFailedTests + brokenFiles.length === 0) {
    console.error('An error happened outside any test.');
    failed += 1;
  }
}

function filesUnder(folder) {
  if (!fs.existsSync(folder)) return [];
  return fs.readdirSync(folder, { recursive: true }).filter((file) => file.endsWith('.test.ts'));
}

async function testFast() {
  await attempt('route types', writeRouteTypes);
  await checkSources({ ...process.env, REDOCLY_TELEMETRY: 'off' });
  await runTests(process.env, ['--project=fast']);
}

async function testAll() {
  const trial = prepareTrial();
  undone.push(trial.undo);
  const { environment } = trial;
  environment.REDOCLY_TELEMETRY = 'off';
  environment.LINEWRIGHT_OBSERVED = path.join(trial.folder, 'observed.txt');

  const database = await attempt('database', trial.database);
  const schema = database && (await attempt('schema', trial.schema));
  const browser = await attempt('browser', provideBrowser);
  const build = await attempt('build', trial.build);
  await checkSources(environment);
  const app = schema && build && (await attempt('app', trial.app));

  const options = [];
  if (browser) {
    environment.CHROMIUM_PATH = browser.result.path;
  } else {
    options.push('--exclude=tests/browser/**');
    // One was counted already, for the browser itself.
    const stories = filesUnder(path.join(repository, 'tests/browser'));
    failed += Math.max(0, stories.length - 1);
    console.error(`Without a browser none of the ${stories.length} files of tests/browser could be run; they count as failed.`);
  }
  if (!app) options.push('--project=fast');
  await runTests(environment, options);
}

console.log('Linewright: tests');
if (await attempt('packages', installPackages)) await (isFast ? testFast() : testAll());
await clearUp();
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
