/**
 * Programs run to their end, each in a process group of its own: Ctrl-C in the terminal then reaches the
 * command alone, which stops what it started in the order it needs.
 */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

export const repository = fileURLToPath(new URL('..', import.meta.url)).replace(/\/$/, '');

/** What has not ended yet, and how long it may take to when asked. */
const running = new Map();

/** Puts a process among those that `endRunning` ends, until the answered function is called. */
export function track(child, patience = 5_000) {
  running.set(child, patience);
  return () => running.delete(child);
}

/** Answers `{ code, output }`; `echo` also shows the output as it comes. In plain text, for it may go to a file. */
export function run(program, words, { env = process.env, echo = false, input = '' } = {}) {
  return new Promise((resolve, reject) => {
    const { FORCE_COLOR: _, ...uncoloured } = env;
    const child = spawn(program, words, { cwd: repository, env: { ...uncoloured, NO_COLOR: '1' }, detached: true });
    const untrack = track(child);
    let output = '';
    for (const stream of [child.stdout, child.stderr]) {
      stream.setEncoding('utf8');
      stream.on('data', (text) => {
        output += text;
        if (echo) process.stdout.write(text);
      });
    }
    child.stdin.on('error', () => {});
    child.stdin.end(input);
    child.once('error', (error) => {
      untrack();
      reject(error);
    });
    child.once('close', (code, signal) => {
      untrack();
      resolve({ code: code ?? 1, output, signal });
    });
  });
}

/** Ends every program that is still waited for, and everything those started. */
export async function endRunning() {
  await Promise.all([...running].map(([child, patience]) => endGroup(child, patience)));
}

/** Asks a process group to end, and after `patience` milliseconds makes it. */
export function endGroup(child, patience) {
  if (child.exitCode !== null || child.signalCode !== null) return Promise.resolve();
  return new Promise((resolve) => {
    const force = setTimeout(() => signalGroup(child, 'SIGKILL'), patience);
    child.once('exit', () => {
      clearTimeout(force);
      // Whatever of the group has outlived its head has no one left to wait for it.
      signalGroup(child, 'SIGKILL');
      resolve();
    });
    signalGroup(child, 'SIGTERM');
  });
}

function signalGroup(child, signal) {
  try {
    process.kill(-child.pid, signal);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

/**
 * Calls `handler` once, at the first signal to stop. npm passes on a signal that the terminal has sent us
 * already, so a second one says nothing new.
 */
export function whenToldToStop(handler) {
  let told = false;
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    process.on(signal, () => {
      if (told) return;
      told = true;
      handler(signal);
    });
  }
}
