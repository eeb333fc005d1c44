/**
 * An installation for one test run: a database from nothing, a build in a folder of its own, the app on a
 * free port, secrets that were never used before. Everything of it is gone afterwards.
 */
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { discardLocalServer, installedServers, startLocalServer } from '../db/local-server.mjs';
import { runTypeScript, startApp } from './app.mjs';
import { buildIfChanged } from './build.mjs';
import { newSecrets } from './data-folder.mjs';
import { installPackage, refuseMainCluster } from './debian.mjs';

export const trialDist = '.next-test';
const folderName = /^linewright-trial-(\d+)-/;

/** What a trial is made of, in order. Each step undoes itself through `undo`; `environment` grows. */
export function prepareTrial() {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), `linewright-trial-${process.pid}-`));
  const undone = [() => fs.rmSync(folder, { recursive: true, force: true })];
  const { POSTGRES_PASSWORD: password, ...secrets } = newSecrets();
  const environment = { ...process.env, ...secrets, HOST: '127.0.0.1', PORT: '0', LINEWRIGHT_DATA: folder, LINEWRIGHT_DIST: trialDist };
  // The app says where it is by itself; what the caller's shell says is about another one.
  for (const name of ['PUBLIC_URL', 'TRUST_PROXY', 'NODE_ENV', 'NEXT_DIST_DIR']) delete environment[name];

  return {
    folder,
    environment,

    async database() {
      if (installedServers().length === 0) await installPackage('postgresql', { before: refuseMainCluster });
      await sweep();
      const place = path.join(folder, 'postgres');
      undone.push(() => discardLocalServer(place));
      const server = await startLocalServer({ folder: place, password, durable: false });
      environment.DATABASE_URL = server.url;
      return `PostgreSQL ${server.version} ${server.state} on 127.0.0.1:${server.port}`;
    },

    schema: () => runTypeScript('db/migrate.ts', environment, 'The migrations do not run from zero.'),

    build: () => buildIfChanged(trialDist, environment),

    async app() {
      const app = await startApp({ env: { ...environment, NEXT_DIST_DIR: trialDist } });
      undone.push(app.stop);
      environment.LINEWRIGHT_URL = app.url;
      environment.PUBLIC_URL = app.url;
      return `listening on ${app.url}`;
    },

    /** Stops and removes everything, last first. */
    async undo() {
      while (undone.length > 0) await undone.pop()();
    },
  };
}

/** Trials whose process was killed could not clear up after themselves. */
async function sweep() {
  for (const name of fs.readdirSync(os.tmpdir())) {
    const pid = folderName.exec(name)?.[1];
    if (!pid || fs.existsSync(`/proc/${pid}`)) continue;
    const folder = path.join(os.tmpdir(), name);
    try {
      await discardLocalServer(path.join(folder, 'postgres'));
      fs.rmSync(folder, { recursive: true, force: true });
    } catch {
      // Another user's, and so not ours to clear.
    }
  }
}
