// `npm test` on a fresh machine: installs what is missing, Debian's Chromium included, then runs every check and stops at the first
// that fails.
import { spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { buildIfStale, installIfStale, run, stopIfNodeIsOld } from './fresh.mjs';

stopIfNodeIsOld();
installIfStale();
findOrInstallChromium();
const vitest = (project) => run('npx', ['vitest', 'run', '--project', project]);
step('Lint', () => run('npx', ['eslint', '.']));
step('Format', () => run('npx', ['prettier', '--check', '--log-level', 'warn', '.']));
step('Types', () => run('npx', ['tsc', '--noEmit']));
step('Rules and data', () => vitest('shared'));
step('Server', () => vitest('server'));
step('Pages', () => vitest('src'));
step('Build', () => buildIfStale());
step('Browser', () => vitest('e2e'));

function step(name, check) {
  const start = Date.now();
  console.log(`\n== ${name}`);
  check();
  console.log(`== ${name}: well, ${Math.round((Date.now() - start) / 1000)} s`);
}

function findOrInstallChromium() {
  if (hasChromium()) return;
  const debian = existsSync('/etc/debian_version') && process.getuid?.() === 0;
  if (!debian) {
    console.error(
      'The browser tests need Chromium. Install it (Debian: apt-get install chromium), or set CHROME_PATH.',
    );
    process.exit(1);
  }
  console.log('Installing Chromium…');
  run('apt-get', ['update', '-qq']);
  const { status } = spawnSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
  if (status !== 0 || !hasChromium()) {
    console.error('Chromium could not be installed.');
    process.exit(1);
  }
}

function hasChromium() {
  const names = ['chromium', 'chromium-browser', 'google-chrome-stable', 'google-chrome'];
  const folders = (process.env.PATH ?? '').split(delimiter);
  const candidates = process.env.CHROME_PATH
    ? [process.env.CHROME_PATH]
    : folders.flatMap((folder) => names.map((name) => join(folder, name)));
  return candidates.some((candidate) => {
    try {
      accessSync(candidate, constants.X_OK);
      return true;
    } catch {
      return false;
    }
  });
}
