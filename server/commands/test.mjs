// `npm test` on a fresh machine: installs what is missing, Debian's Chromium included, then runs every check and stops at the first
// that fails.
import { spawn, spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { buildIfStale, installIfStale, root, run, stopIfNodeIsOld } from './fresh.mjs';

stopIfNodeIsOld();
installIfStale();
findOrInstallChromium();
const vitest = (project) => ['npx', 'vitest', 'run', '--project', project];
// Two chains side by side, one for each of two cores; each check's output is shown whole when it ends.
await together(
  [
    ['Lint', ['npx', 'eslint', '.']],
    ['Format', ['npx', 'prettier', '--check', '--log-level', 'warn', '.']],
    ['Types', ['npx', 'tsc', '--noEmit']],
  ],
  [
    ['Rules and data', vitest('shared')],
    ['Pages', vitest('src')],
  ],
);
await check('Server', vitest('server'));
step('Build', () => buildIfStale());
await check('Browser', vitest('e2e'));
console.log('\nEverything is well.');

function step(name, work) {
  const start = Date.now();
  console.log(`\n== ${name}`);
  work();
  console.log(`== ${name}: well, ${Math.round((Date.now() - start) / 1000)} s`);
}

async function together(...chains) {
  await Promise.all(
    chains.map(async (chain) => {
      for (const [name, command] of chain) await check(name, command);
    }),
  );
}

/** Runs one check; the first that fails ends everything. */
function check(name, [command, ...args]) {
  const start = Date.now();
  return new Promise((resolve) => {
    const child = spawn(command, args, { cwd: root, stdio: ['ignore', 'pipe', 'pipe'] });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk) => (output += chunk));
    child.on('close', (code) => {
      console.log(`\n== ${name}\n${output.trim()}`);
      if (code !== 0) {
        console.log(`== ${name}: not well`);
        process.exit(1);
      }
      console.log(`== ${name}: well, ${Math.round((Date.now() - start) / 1000)} s`);
      resolve();
    });
  });
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
