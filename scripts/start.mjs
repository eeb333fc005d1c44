/**
 * From a fresh clone to a running service: packages, database, schema, demo data, build, server; one line
 * a step. Ctrl-C stops the server when its requests are answered, and then the database.
 *
 *   PORT, HOST      where to serve: 3000 on 127.0.0.1
 *   DATABASE_URL    a PostgreSQL of your own instead of the one kept in .data
 *   LINEWRIGHT_DATA the data folder
 *   --dev           development mode, without a build
 */
import fs from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { installedServers, startLocalServer } from '../db/local-server.mjs';
import { portTaken, runTypeScript, startApp } from './app.mjs';
import { buildIfChanged } from './build.mjs';
import { dataFolder, keepSecrets, readData, writeData } from './data-folder.mjs';
import { installPackage, refuseMainCluster } from './debian.mjs';
import { installPackages } from './packages.mjs';
import { endRunning, whenToldToStop } from './processes.mjs';
import { interruptStep, reportFailure, step, StepFailure } from './steps.mjs';

const dev = process.argv.includes('--dev');
const host = process.env.HOST ?? '127.0.0.1';
const port = Number(process.env.PORT ?? 3000);

/** What to undo, last first. */
const started = [];

let told = false;

async function stopAll() {
  while (started.length > 0) {
    const { name, stop } = started.pop();
    await step(name, async () => {
      await stop();
      return 'stopped';
    });
  }
}

async function end(code) {
  try {
    await stopAll();
  } catch (error) {
    reportFailure(error);
    code = 1;
  }
  process.exit(code);
}

whenToldToStop(async () => {
  told = true;
  const left = interruptStep();
  await endRunning();
  await left;
  await end(0);
});

// ---------------------------------------------------------------------------------------------------
// Before anything is started

function refuseOldNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major < 20 || (major === 20 && minor < 19)) throw new StepFailure(`Linewright needs Node 20.19 or newer; this is ${process.versions.node}.`);
}

function refuseUnusablePort() {
  if (!Number.isInteger(port) || port < 0 || port > 65_535) throw new StepFailure(`PORT must be a port number; it is ${process.env.PORT}.`);
}

/** One installation, one start: two would share a database and stop it under each other. */
function claimDataFolder() {
  const before = readData('start.json');
  if (before && isAlive(before)) {
    throw new StepFailure(`Linewright is already started from this folder (process ${before.pid}, ${before.url}).`);
  }
  writeData('start.json', { pid: process.pid, url: `http://${host}:${port}` });
  process.on('exit', () => fs.rmSync(path.join(dataFolder, 'start.json'), { force: true }));
}

function isAlive({ pid }) {
  try {
    return pid !== process.pid && fs.readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('scripts/start.mjs');
  } catch {
    return false;
  }
}

async function refuseTakenPort() {
  const deadline = Date.now() + 3_000;
  // The server of a killed start goes by itself within a moment.
  while (!(await isFree())) {
    if (Date.now() > deadline) throw new StepFailure(portTaken(port));
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
}

function isFree() {
  return new Promise((resolve, reject) => {
    const probe = net.createServer();
    probe.once('error', (error) => (error.code === 'EADDRINUSE' ? resolve(false) : reject(new StepFailure(`Cannot listen on ${host}:${port}: ${error.message}.`))));
    probe.listen(port, host, () => probe.close(() => resolve(true)));
  });
}

// ---------------------------------------------------------------------------------------------------
// The steps

/** Once told to stop, nothing more begins. */
function advance(name, work) {
  return told ? new Promise(() => {}) : step(name, work);
}

async function startDatabase(secrets, made) {
  if (installedServers().length === 0) await installPackage('postgresql', { before: refuseMainCluster });
  const server = await startLocalServer({
    folder: path.join(dataFolder, 'postgres'),
    password: secrets.POSTGRES_PASSWORD,
    passwordIsNew: made.includes('POSTGRES_PASSWORD'),
    preferredPort: readData('postgres.json')?.port,
  });
  started.push({ name: 'database', stop: server.stop });
  writeData('postgres.json', { port: server.port });
  return { url: server.url, said: `PostgreSQL ${server.version} ${server.state} on 127.0.0.1:${server.port}` };
}

function printBlock(url, demo) {
  const lines = ['', `Linewright is at ${url}`, ''];
  if (demo) {
    const width = Math.max(...demo.members.map(({ email }) => email.length));
    lines.push('Sign in as');
    for (const { email, password, role } of demo.members) lines.push(`  ${email.padEnd(width)}   ${password}   ${role}`);
    lines.push('', 'API key', `  ${demo.key}`, '', 'First call', `  ${firstCall(url, demo.key)}`, '');
  }
  lines.push('Ctrl-C stops it.', '');
  console.log(lines.join('\n'));
}

function firstCall(url, key) {
  const input = {
    line: { kind: 'rlgc', resistance_ohm_per_m: 0.8, inductance_h_per_m: 2.5e-7, conductance_s_per_m: 1e-5, capacitance_f_per_m: 1e-10 },
    length_m: 3.2,
    termination: { re: 75, im: -30 },
    frequency_hz: 1e8,
  };
  return `curl -s ${url}/api/v1/terminations/input-impedance -H 'Authorization: Bearer ${key}' -H 'Content-Type: application/json' -d '${JSON.stringify(input)}'`;
}

async function start() {
  console.log('Linewright');
  refuseOldNode();
  refuseUnusablePort();
  const { secrets, made } = keepSecrets();
  claimDataFolder();
  await refuseTakenPort();
  await advance('packages', installPackages);

  const databaseUrl = process.env.DATABASE_URL
    ? (await advance('database', () => ({ url: process.env.DATABASE_URL, said: 'as DATABASE_URL says' }))).url
    : (await advance('database', () => startDatabase(secrets, made))).url;
  const env = {
    SESSION_KEY: secrets.SESSION_KEY,
    KEY_PEPPER: secrets.KEY_PEPPER,
    ...process.env,
    DATABASE_URL: databaseUrl,
    LINEWRIGHT_DATA: dataFolder,
    HOST: host,
    PORT: String(port),
  };
  await advance('schema', () => runTypeScript('db/migrate.ts', env, 'The database could not be brought to the newest schema.'));
  await advance('demo data', () => runTypeScript('scripts/demo.ts', env, 'The demo organization could not be made.'));
  if (!dev) await advance('build', () => buildIfChanged(process.env.NEXT_DIST_DIR ?? '.next'));

  const app = await advance('server', async () => {
    const running = await startApp({ env, dev });
    started.push({ name: 'server', stop: running.stop });
    return { ...running, said: `listening on ${running.url}` };
  });
  printBlock(app.url, readData('demo.json'));

  const { code, signal } = await app.ended;
  if (told) return;
  started.pop();
  console.error(`The server ended by itself (${signal ?? `exit code ${code}`}).`);
  await end(1);
}

try {
  await start();
} catch (error) {
  // Told to stop, it has ended what the step waited for: no failure.
  if (!told) {
    reportFailure(error);
    await end(1);
  }
}
