/** The production build, made when a source has changed since the last one. */
import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { repository, run } from './processes.mjs';
import { StepFailure } from './steps.mjs';

// The reference data are part of the build: the verification page shows them.
const folders = ['app', 'lib', 'db', 'openapi', 'public', 'tests/reference'];
/** Written by the build itself, or no part of it. */
const ignored = new Set(['next-env.d.ts', 'vitest.config.ts', 'eslint.config.mjs']);

export async function buildIfChanged(distFolder, env = process.env) {
  const stamp = path.join(repository, distFolder, 'linewright-sources');
  const wanted = digestOfSources();
  if (fs.existsSync(stamp) && fs.readFileSync(stamp, 'utf8') === wanted) return 'up to date';
  fs.rmSync(stamp, { force: true });
  const { code, output } = await run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], {
    env: { ...env, NODE_ENV: 'production', NEXT_DIST_DIR: distFolder, NEXT_TELEMETRY_DISABLED: '1' },
  });
  if (code !== 0) throw new StepFailure('The build failed.', output);
  fs.writeFileSync(stamp, wanted);
  return 'built';
}

function digestOfSources() {
  const hash = createHash('sha256').update(process.version);
  for (const file of sources()) {
    hash.update(`\0${file}\0`).update(fs.readFileSync(path.join(repository, file)));
  }
  return hash.digest('hex');
}

function sources() {
  const atRoot = fs
    .readdirSync(repository)
    .filter((file) => (/\.(ts|mjs)$/.test(file) && !ignored.has(file)) || file === 'package.json' || file === 'package-lock.json');
  const inFolders = folders
    .filter((folder) => fs.existsSync(path.join(repository, folder)))
    .flatMap((folder) =>
      fs
        .readdirSync(path.join(repository, folder), { recursive: true, withFileTypes: true })
        .filter((entry) => entry.isFile())
        .map((entry) => path.relative(repository, path.join(entry.parentPath ?? entry.path, entry.name))),
    );
  return [...atRoot, ...inFolders].sort();
}
