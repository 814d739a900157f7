import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const root = path.resolve(import.meta.dirname, '..');
const PLACES = ['/usr/sbin', '/usr/bin', '/usr/local/sbin', '/usr/local/bin'];

/** @param {string} text */
export function say(text) {
  process.stderr.write(`· ${text}\n`);
}

/** Installs the locked packages when they are missing or the lock file has changed. */
export function installPackages() {
  const stamp = path.join(root, 'node_modules', '.weepmark-lock');
  const lock = createHash('sha256')
    .update(readFileSync(path.join(root, 'package-lock.json')))
    .digest('hex');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lock) return;
  say('Installing the locked packages (about half a minute) …');
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
  writeFileSync(stamp, lock);
}

/**
 * Installs a package of Debian when its program is missing.
 * @param {string} debianPackage
 * @param {string} program
 */
export function installDebianPackage(debianPackage, program) {
  if (PLACES.some((place) => existsSync(path.join(place, program)))) return;
  const asRoot = process.getuid?.() === 0;
  const sudo = !asRoot && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0;
  if (!asRoot && !sudo) {
    fail(
      `${program} is missing and this account may not install it. Run: sudo apt-get install ${debianPackage}`,
    );
  }
  say(`Installing ${debianPackage} from Debian (a minute or two) …`);
  const [command, ...before] = asRoot ? ['apt-get'] : ['sudo', '-n', 'apt-get'];
  run(command, [...before, 'update', '-qq']);
  run(command, [...before, 'install', '-y', '-qq', '--no-install-recommends', debianPackage]);
}

/**
 * @param {string} command
 * @param {string[]} args
 */
function run(command, args) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const { status, stdout, stderr } = spawnSync(command, args, {
    cwd: root,
    env,
    encoding: 'utf8',
    maxBuffer: 64_000_000,
  });
  if (status !== 0) fail(`${command} ${args.join(' ')} failed:\n${stdout ?? ''}${stderr ?? ''}`);
}

/**
 * @param {string} text
 * @returns {never}
 */
function fail(text) {
  process.stderr.write(`${text}\n`);
  process.exit(1);
}
