/** Packages of Debian, where this user may install them. */
import fs from 'node:fs';
import { run } from './processes.mjs';
import { StepFailure } from './steps.mjs';

/** The words before a command that must run as root, or null when we may not. */
async function asRoot() {
  if (process.getuid() === 0) return [];
  try {
    const { code } = await run('sudo', ['-n', 'true']);
    return code === 0 ? ['sudo', '-n'] : null;
  } catch {
    return null;
  }
}

/** Installs a package, or says in one sentence what to run instead. */
export async function installPackage(name, { before } = {}) {
  const advice = `Install it with: sudo apt-get update && sudo apt-get install -y ${name}`;
  const prefix = await asRoot();
  if (!fs.existsSync('/usr/bin/apt-get') || prefix === null) throw new StepFailure(`${name} is not installed. ${advice}`);
  const runAsRoot = ([program, ...words], input) => {
    const [first, ...rest] = [...prefix, 'env', 'DEBIAN_FRONTEND=noninteractive', program, ...words];
    return run(first, rest, { input });
  };
  await before?.(runAsRoot);
  const patience = ['-o', 'DPkg::Lock::Timeout=120'];
  const updated = await runAsRoot(['apt-get', ...patience, 'update']);
  const installed = await runAsRoot(['apt-get', ...patience, 'install', '-y', '--no-install-recommends', name]);
  if (installed.code !== 0) {
    throw new StepFailure(`${name} could not be installed. ${advice}`, `${updated.code === 0 ? '' : updated.output}${installed.output}`);
  }
}

/** Debian's own cluster would take memory and a port for nothing; who has one, or has chosen, keeps it. */
export async function refuseMainCluster(runAsRoot) {
  const folder = '/etc/postgresql-common/createcluster.d';
  if (fs.existsSync('/etc/postgresql-common/createcluster.conf') || fs.existsSync(`${folder}/no-main-cluster.conf`)) return;
  await runAsRoot(['mkdir', '-p', folder]);
  await runAsRoot(['tee', `${folder}/no-main-cluster.conf`], 'create_main_cluster = false\n');
}
