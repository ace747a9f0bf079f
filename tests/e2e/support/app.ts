import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../../../', import.meta.url));

export type SignIn = { role: string; email: string; password: string };

export type RunningApp = {
  url: string;
  dataDir: string;
  process: ChildProcess;
  output: () => string;
  signIns: SignIn[];
  /** Ends the server the polite way and waits for it. */
  stop: () => Promise<void>;
  /** Removes the data as well. */
  discard: () => Promise<void>;
};

/** Starts the built server on a port of the system's choice, with its own data. */
export async function startApp({
  dataDir,
  env = {},
}: { dataDir?: string; env?: Record<string, string> } = {}): Promise<RunningApp> {
  const folder = dataDir ?? (await mkdtemp(join(tmpdir(), 'tb-e2e-')));
  const child = spawn(process.execPath, [join(root, 'dist/server/main.js')], {
    cwd: root,
    env: {
      ...process.env,
      NODE_ENV: 'production',
      PORT: '0',
      TOEBOARD_DATA: folder,
      LOG_LEVEL: 'warn',
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  const url = await new Promise<string>((resolve, reject) => {
    const read = (chunk: Buffer) => {
      output += chunk.toString();
      const address = /http:\/\/(?:localhost|127\.0\.0\.1):\d+/.exec(output)?.[0];
      if (address) resolve(address);
    };
    child.stdout.on('data', read);
    child.stderr.on('data', read);
    child.once('exit', (code) => reject(new Error(`The server ended with ${code}:\n${output}`)));
  });
  const stop = () =>
    new Promise<void>((resolve) => {
      if (child.exitCode !== null || child.signalCode !== null) return resolve();
      child.once('exit', () => resolve());
      child.kill('SIGTERM');
    });
  return {
    url,
    dataDir: folder,
    process: child,
    output: () => output,
    signIns: JSON.parse(await readFile(join(root, 'templates/demo/signins.json'), 'utf8')) as SignIn[],
    stop,
    async discard() {
      await stop();
      await rm(folder, { recursive: true, force: true });
    },
  };
}
