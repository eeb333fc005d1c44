/** Another process of the app than the run's own, from the same build, with another environment. */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

export interface SecondServer {
  readonly url: string;
  /** What it has printed so far. */
  log(): string;
  /** Ends it; SIGKILL gives it no time to finish anything. */
  stop(signal?: NodeJS.Signals): Promise<void>;
}

export async function startSecondServer(environment: Record<string, string> = {}): Promise<SecondServer> {
  const { LINEWRIGHT_DIST, PORT: _, ...inherited } = process.env;
  if (!LINEWRIGHT_DIST) throw new Error('LINEWRIGHT_DIST is not set: there is no build to start');
  const child = spawn(process.execPath, ['scripts/server.mjs'], {
    cwd: fileURLToPath(new URL('../..', import.meta.url)),
    env: { ...inherited, NODE_ENV: 'production', NEXT_DIST_DIR: LINEWRIGHT_DIST, NEXT_TELEMETRY_DISABLED: '1', PORT: '0', ...environment },
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  });
  let log = '';
  for (const stream of [child.stdout, child.stderr]) stream?.setEncoding('utf8').on('data', (text) => (log += text));
  const ended = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  const { url } = await Promise.race([
    new Promise<{ url: string }>((resolve) => child.once('message', (message) => resolve(message as { url: string }))),
    ended.then(() => Promise.reject(new Error(`the second server ended while it was starting:\n${log}`))),
  ]);
  return {
    url,
    log: () => log,
    stop: (signal = 'SIGTERM') => {
      if (child.exitCode === null && child.signalCode === null) child.kill(signal);
      return ended;
    },
  };
}
