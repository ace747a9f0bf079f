// `npm start` on a fresh machine: installs what is missing, builds what is out of date, then becomes the server. Plain JavaScript,
// because it runs before anything is installed.
import { spawn } from 'node:child_process';
import { buildIfStale, installIfStale, root, stopIfNodeIsOld } from './fresh.mjs';

stopIfNodeIsOld();
installIfStale();
buildIfStale();

const server = spawn(process.execPath, ['--enable-source-maps', 'dist/server/main.js'], {
  cwd: root,
  stdio: 'inherit',
  env: { ...process.env, NODE_ENV: 'production' },
});
for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP']) process.on(signal, () => server.kill(signal));
server.on('exit', (code, signal) => process.exit(code ?? (signal ? 1 : 0)));
