import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { createHash } from 'node:crypto';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = join(dirname(fileURLToPath(import.meta.url)), '../..');

/** Runs a command with its output shown; ends this process where it fails. */
export function run(command, args, { quiet = false } = {}) {
  const { status, error } = spawnSync(command, args, {
    cwd: root,
    stdio: quiet ? ['ignore', 'ignore', 'inherit'] : 'inherit',
  });
  if (error) console.error(error.message);
  if (status !== 0) process.exit(status ?? 1);
}

export function stopIfNodeIsOld() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  console.error(`Toeboard needs Node.js 20.19 or newer; this is ${process.versions.node}.`);
  process.exit(1);
}

/** Installs the packages of package-lock.json unless exactly those are there. */
export function installIfStale() {
  const stamp = join(root, 'node_modules/.toeboard-installed');
  const wanted = createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return;
  console.log('Installing packages…');
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
  writeFileSync(stamp, wanted);
}

const sources = [
  'src',
  'server',
  'shared',
  'sign',
  'templates',
  'index.html',
  'package.json',
  'vite.config.ts',
];

/** Builds pages and server unless the build is younger than every source. */
export function buildIfStale() {
  const built = join(root, 'dist/server/main.js');
  const builtAt = existsSync(built) ? statSync(built).mtimeMs : 0;
  if (builtAt > Math.max(...sources.map((source) => youngest(join(root, source))))) return;
  console.log('Building…');
  run('npm', ['run', '--silent', 'build']);
}

function youngest(path) {
  const stat = statSync(path);
  if (!stat.isDirectory()) return stat.mtimeMs;
  return Math.max(stat.mtimeMs, ...readdirSync(path).map((name) => youngest(join(path, name))));
}
