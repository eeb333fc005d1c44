/** The packages of package-lock.json, installed when they are missing or the lock file has changed. */
import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { repository, run } from './processes.mjs';
import { StepFailure } from './steps.mjs';

const stamp = path.join(repository, 'node_modules', '.linewright-lock');

export async function installPackages() {
  const wanted = createHash('sha256').update(fs.readFileSync(path.join(repository, 'package-lock.json'))).digest('hex');
  if (fs.existsSync(stamp) && fs.readFileSync(stamp, 'utf8') === wanted) return 'up to date';
  if (isInstalledAlready()) {
    fs.writeFileSync(stamp, wanted);
    return 'up to date';
  }
  // The build needs the development packages too, whatever NODE_ENV says.
  const { code, output } = await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund']);
  if (code !== 0) throw new StepFailure('npm could not install the packages of package-lock.json.', output);
  fs.writeFileSync(stamp, wanted);
  return 'installed';
}

/** Somebody ran npm: its own record of what it installed then says the same as the lock file. */
function isInstalledAlready() {
  const installed = packagesOf(path.join('node_modules', '.package-lock.json'));
  if (!installed) return false;
  // What is optional may be for another platform than this one.
  return Object.entries(packagesOf('package-lock.json')).every(
    ([name, { version, optional }]) => name === '' || (installed[name] ? installed[name].version === version : optional),
  );
}

function packagesOf(file) {
  const whole = path.join(repository, file);
  return fs.existsSync(whole) ? JSON.parse(fs.readFileSync(whole, 'utf8')).packages : null;
}
