import { spawn } from 'node:child_process';
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { hostname } from 'node:os';
import { join } from 'node:path';

export type DataLock = { release: () => void };

/** Another process has the data folder. */
export class DataFolderInUse extends Error {}

/**
 * Takes the data folder for this process. The kernel's lock is held by a small child that ends when our pipe to it closes, so it is
 * free at once however this process ends, kill -9 included.
 */
export async function lockDataFolder(dataDir: string): Promise<DataLock> {
  await mkdir(dataDir, { recursive: true, mode: 0o700 });
  const file = join(dataDir, 'toeboard.lock');
  const hold = 'echo held; exec cat >/dev/null';
  const [command, args] =
    process.platform === 'darwin'
      ? (['lockf', ['-s', '-t', '0', '-k', file, 'sh', '-c', hold]] as const)
      : (['flock', ['--nonblock', '--no-fork', file, 'sh', '-c', hold]] as const);
  const child = spawn(command, args, { stdio: ['pipe', 'pipe', 'ignore'] });
  const held = await new Promise<boolean>((resolve, reject) => {
    child.once('error', () =>
      reject(new Error(`The program "${command}" is needed to guard the data folder, and is not installed.`)),
    );
    child.once('exit', () => resolve(false));
    child.stdout.once('data', () => resolve(true));
  });
  if (!held)
    throw new DataFolderInUse(
      `The data folder ${dataDir} is in use by another Toeboard process${await holderOf(file)}. Stop it first, or set TOEBOARD_DATA to another folder.`,
    );
  await writeFile(
    file,
    `${JSON.stringify({ pid: process.pid, host: hostname(), since: new Date().toISOString() })}\n`,
  );
  child.unref();
  return { release: () => void child.stdin.end() };
}

async function holderOf(file: string): Promise<string> {
  try {
    const { pid, host, since } = JSON.parse(await readFile(file, 'utf8')) as {
      pid: number;
      host: string;
      since: string;
    };
    return ` (process ${pid} on ${host}, since ${since})`;
  } catch {
    return '';
  }
}
