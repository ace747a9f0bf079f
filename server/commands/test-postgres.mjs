// `npm run test:postgres`: the server's tests on a PostgreSQL server that is made for them and thrown away. Needs PostgreSQL's own
// tools (initdb, pg_ctl) on this machine.
import { spawnSync } from 'node:child_process';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { root } from './fresh.mjs';

const isRoot = process.getuid?.() === 0;
const folder = mkdtempSync(join(tmpdir(), 'tb-postgres-'));
const data = join(folder, 'data');
const port = await freePort();

/** PostgreSQL refuses to run as root: then its own account runs it. */
function tool(name, args) {
  const quoted = [name, ...args].map((word) => `'${word}'`).join(' ');
  const [command, given] = isRoot
    ? ['su', ['postgres', '-s', '/bin/sh', '-c', quoted]]
    : ['sh', ['-c', quoted]];
  const { status, stderr } = spawnSync(command, given, {
    cwd: '/',
    stdio: ['ignore', 'ignore', 'pipe'],
    encoding: 'utf8',
  });
  if (status !== 0) throw new Error(`${name} failed: ${stderr}`);
}

if (isRoot) {
  chmodSync(folder, 0o777);
}
let status;
try {
  tool('initdb', ['-D', data, '-A', 'trust', '-U', 'toeboard', '--encoding=UTF8', '--locale=C.UTF-8']);
  tool('pg_ctl', [
    '-D',
    data,
    '-w',
    '-l',
    join(folder, 'log'),
    '-o',
    `-p ${port} -c listen_addresses=127.0.0.1 -c unix_socket_directories=${folder} -c fsync=off`,
    'start',
  ]);
  try {
    ({ status } = spawnSync('npx', ['vitest', 'run', '--project', 'server', ...process.argv.slice(2)], {
      cwd: root,
      stdio: 'inherit',
      env: { ...process.env, TEST_POSTGRES: `postgres://toeboard@127.0.0.1:${port}/postgres` },
    }));
  } finally {
    tool('pg_ctl', ['-D', data, '-m', 'immediate', 'stop']);
  }
} finally {
  rmSync(folder, { recursive: true, force: true });
}
process.exit(status ?? 1);

function freePort() {
  return new Promise((resolve) => {
    const server = createServer().listen(0, '127.0.0.1', () => {
      const { port: free } = server.address();
      server.close(() => resolve(free));
    });
  });
}
