import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { ROOT, run, Stop, step } from './command.mjs';

const isRoot = process.getuid?.() === 0;

/** Installs what package-lock.json says, unless exactly that is there. */
export async function ensureNodePackages() {
  if (installedAsLocked()) return;
  await step('Installing npm packages', () => run('npm', ['ci', '--loglevel=error']));
}

/** npm leaves in node_modules what it installed, in the form of the lock file, when it has finished. */
function installedAsLocked() {
  const record = join(ROOT, 'node_modules/.package-lock.json');
  if (!existsSync(record)) return false;
  const locked = JSON.parse(readFileSync(join(ROOT, 'package-lock.json'), 'utf8')).packages;
  const installed = JSON.parse(readFileSync(record, 'utf8')).packages;
  return Object.entries(locked).every(
    ([path, { version, optional }]) =>
      path === '' || (installed[path] ? installed[path].version === version : optional === true),
  );
}

const DEBIAN = '/usr/lib/postgresql';

/** The folder of initdb, pg_ctl and postgres: of this major version, or of the newest that is installed. */
export function postgresBin(major) {
  const versions = existsSync(DEBIAN) ? readdirSync(DEBIAN).map(Number).filter(Number.isInteger) : [];
  return versions
    .sort((a, b) => b - a)
    .filter((version) => major === undefined || version === major)
    .map((version) => join(DEBIAN, String(version), 'bin'))
    .find((folder) => existsSync(join(folder, 'initdb')));
}

const CHROMIUM = '/usr/bin/chromium';

const NEEDS = {
  postgresql: { found: () => postgresBin() !== undefined, why: 'the database' },
  chromium: { found: () => existsSync(CHROMIUM), why: 'the browser of the tests' },
};

/** Installs Debian packages that are missing; without root, says how and stops. */
export async function ensureDebianPackages(names) {
  const missing = names.filter((name) => !NEEDS[name].found());
  if (missing.length === 0) return;
  const what = missing.map((name) => `${name} (${NEEDS[name].why})`).join(' and ');
  const install = ['install', '-y', '--no-install-recommends', ...missing];
  if (!existsSync('/usr/bin/apt-get'))
    throw new Stop(`Missing: ${what}. Install it with your system's package manager under ${DEBIAN}.`);
  if (!isRoot)
    throw new Stop(
      `Missing: ${what}. Run this, then try again:\n\n  sudo apt-get update && sudo apt-get ${install.join(' ')}`,
    );
  await step(`Installing ${what}`, () => withoutMainCluster(() => aptInstall(install)));
  const absent = missing.filter((name) => !NEEDS[name].found());
  if (absent.length > 0)
    throw new Stop(`${absent.join(' and ')} was installed, but is not where Debian puts it.`);
}

async function aptInstall(install) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  await run('apt-get', ['update'], { env });
  await run('apt-get', install, { env });
}

/** Debian's package would make and start a cluster of its own beside ours. */
async function withoutMainCluster(work) {
  const file = '/etc/postgresql-common/createcluster.d/putlog.conf';
  mkdirSync(dirname(file), { recursive: true });
  writeFileSync(file, 'create_main_cluster = false\n');
  try {
    await work();
  } finally {
    rmSync(file, { force: true });
  }
}
