/** What must be on the machine before anything else: Node itself, the npm packages of the lock file, Debian packages. */
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT } from './places.mjs';
import { runQuietly } from './processes.mjs';
import { SetupError, step } from './steps.mjs';

const OLDEST_NODE = [20, 9];

export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  const [needMajor, needMinor] = OLDEST_NODE;
  if (major > needMajor || (major === needMajor && minor >= needMinor)) return;
  throw new SetupError(`Node ${needMajor}.${needMinor} or newer is needed; this is ${process.versions.node}.`);
}

function readLockedPackages(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')).packages : {};
}

/** True when every package of the lock file is installed in its locked version; those for other platforms do not count. */
function arePackagesInstalled() {
  const installed = readLockedPackages(path.join(ROOT, 'node_modules/.package-lock.json'));
  const locked = Object.entries(readLockedPackages(path.join(ROOT, 'package-lock.json')));
  return locked.every(
    ([place, { version, optional, devOptional }]) =>
      place === '' || optional || devOptional || installed[place]?.version === version,
  );
}

export async function installNpmPackages() {
  if (arePackagesInstalled()) return;
  await step('npm packages (npm ci)', async () => {
    // No dependency needs its install script; one of them would compile for minutes.
    const args = ['ci', '--ignore-scripts', '--include=dev', '--no-audit', '--no-fund', '--no-progress'];
    const { code, output } = await runQuietly('npm', args, { cwd: ROOT });
    if (code !== 0) throw new SetupError(`npm ci failed (exit ${code}):\n${output}`);
  });
}

/** Debian packages by the program that tells whether they are there. */
export const MARIADB = { program: '/usr/sbin/mariadbd', packages: ['mariadb-server-core', 'mariadb-client-core'] };
export const CHROMIUM = { program: '/usr/bin/chromium', packages: ['chromium'] };
export const PYTHON = { program: '/usr/bin/python3', packages: ['python3'] };
/** Outside readers that the annotated MusicXML is held against. */
export const XMLLINT = { program: '/usr/bin/xmllint', packages: ['libxml2-utils'] };
export const LILYPOND = { program: '/usr/bin/musicxml2ly', packages: ['lilypond'] };

async function aptGet(...args) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  return runQuietly('apt-get', ['-y', '-q', ...args], { env });
}

async function installDebianPackages(packages) {
  const install = () => aptGet('install', '--no-install-recommends', ...packages);
  if ((await install()).code === 0) return;
  // A fresh machine has no package lists yet, an old one has lists of versions that are gone.
  const update = await aptGet('update');
  const { code, output } = await install();
  if (code !== 0) throw new SetupError(`apt-get could not install ${packages.join(' ')}:\n${update.output}\n${output}`);
}

/** Installs what is missing of `needs`; without root, says what to install. */
export async function installPrograms(needs) {
  const packages = [...new Set(needs.filter(({ program }) => !existsSync(program)).flatMap((need) => need.packages))];
  if (packages.length === 0) return;
  const command = `apt-get install -y --no-install-recommends ${packages.join(' ')}`;
  if (process.getuid?.() !== 0) throw new SetupError(`Some programs are missing. As root: ${command}`);
  if (!existsSync('/usr/bin/apt-get')) {
    throw new SetupError(`Some programs are missing, and this is not Debian. Install: ${packages.join(' ')}`);
  }
  await step(`Debian packages ${packages.join(', ')}`, () => installDebianPackages(packages));
}
