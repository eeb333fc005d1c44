/** The app as a process: started, waited for, stopped. */
import { spawn } from 'node:child_process';
import { endGroup, repository, run, track } from './processes.mjs';
import { StepFailure } from './steps.mjs';

/** Runs a TypeScript file of ours to its end; answers the last line it printed. */
export async function runTypeScript(file, env, complaint) {
  const { code, output } = await run(process.execPath, ['--import', 'tsx', file], { env });
  if (code !== 0) throw new StepFailure(complaint, output);
  return output.trim().split('\n').pop() || 'done';
}

/** Longer than the server's own limit for requests under way. */
const patienceWithServer = 12_000;

/**
 * Starts the server and waits until it answers. `{ url, stop, ended }`: `ended` resolves when the process
 * is gone, whoever ended it. What it prints before it answers is kept for a failure, later it is passed on.
 */
export async function startApp({ env, dev = false, patience = 90_000 }) {
  const child = spawn(process.execPath, ['scripts/server.mjs', ...(dev ? ['--dev'] : [])], {
    cwd: repository,
    env: { ...env, NODE_ENV: dev ? 'development' : 'production', NEXT_TELEMETRY_DISABLED: '1' },
    detached: true,
    // Over the channel it says which port it has, and by its end it learns that we are gone.
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  });
  let output = '';
  let passOn = false;
  for (const stream of [child.stdout, child.stderr]) {
    stream.setEncoding('utf8');
    stream.on('data', (text) => {
      if (passOn) process.stderr.write(text);
      else output += text;
    });
  }
  let over = false;
  const ended = new Promise((resolve) => {
    child.once('error', (error) => resolve({ code: 1, error }));
    child.once('exit', (code, signal) => resolve({ code, signal }));
  });
  const stop = () => endGroup(child, patienceWithServer);
  const untrack = track(child, patienceWithServer);

  try {
    const url = await Promise.race([
      new Promise((resolve) => child.once('message', ({ url }) => resolve(url))),
      ended.then(() => {
        throw new StepFailure(sentenceFor(output, env), output);
      }),
      after(patience, () => new StepFailure(`The app did not listen within ${patience / 1000} s.`, output)),
    ]);
    await Promise.race([
      untilHealthy(url, () => over),
      ended.then(() => {
        throw new StepFailure('The app ended while it was starting.', output);
      }),
      after(patience, () => new StepFailure(`The app did not answer at ${url}/api/v1/health within ${patience / 1000} s.`, output)),
    ]);
    passOn = true;
    return { url, stop, ended };
  } catch (error) {
    over = true;
    await stop();
    throw error;
  } finally {
    untrack();
  }
}

function sentenceFor(output, { PORT }) {
  return /EADDRINUSE/.test(output) ? portTaken(PORT) : 'The app ended while it was starting.';
}

export function portTaken(port) {
  return `Port ${port} is taken by another program: stop it, or choose another with PORT=${Number(port) + 1} npm start.`;
}

async function untilHealthy(url, isOver) {
  while (!isOver()) {
    try {
      const response = await fetch(`${url}/api/v1/health`, { signal: AbortSignal.timeout(30_000) });
      await response.arrayBuffer();
      if (response.ok) return;
    } catch {
      // Not up yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

function after(milliseconds, failure) {
  return new Promise((_resolve, reject) => setTimeout(() => reject(failure()), milliseconds).unref());
}
