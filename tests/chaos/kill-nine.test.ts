import { execFile, spawnSync } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { signIn } from '#shared/account/account.api.ts';
import { newId } from '#shared/kernel/ids.ts';
import { getSignOn } from '#shared/signons/register.api.ts';
import * as api from '#shared/signons/signons.api.ts';
import { listSites } from '#shared/sites/sites.api.ts';
import { type RunningApp, startApp } from '../e2e/support/app.ts';
import { enrolPhone, signAccessOf, signOnBodyOf } from '../support/phones.ts';
import { Client } from '../support/server.ts';

/** Nothing that was answered is ever lost, however the server ends. */

const root = fileURLToPath(new URL('../../', import.meta.url));
const rounds = Number(process.env.KILL_ROUNDS ?? 3);
const seed = Number(process.env.KILL_SEED ?? 20_260_302);
const inFlight = 6;

let dataDir: string;
beforeAll(async () => (dataDir = await mkdtemp(join(tmpdir(), 'tb-kill-'))));
afterAll(() => rm(dataDir, { recursive: true, force: true }));

/** The same numbers from the same seed (mulberry32), so that a failure can be run again. */
function randomFrom(start: number): () => number {
  let state = start;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** The same person's client at the address that the server has now. */
function movedTo(app: RunningApp, client: Client): Client {
  const moved = new Client(app.url);
  for (const [name, value] of client.cookies) moved.cookies.set(name, value);
  return moved;
}

async function signedIn(app: RunningApp, role: string): Promise<Client> {
  const account = app.signIns.find((candidate) => candidate.role === role);
  const client = new Client(app.url);
  await client.call(signIn, { body: { email: account?.email ?? '', password: account?.password ?? '' } });
  return client;
}

async function prepare(app: RunningApp) {
  const officer = await signedIn(app, 'safetyOfficer');
  const { sites } = await officer.call(listSites, {});
  const site = sites.find(({ name }) => name === 'Lot 7 Wattle Rise');
  const access = await signAccessOf(officer, site?.id ?? '');
  const { token } = access;
  const found = await new Client(app.url).call(api.findPerson, {
    params: { token },
    body: { dayCode: access.dayCode, name: 'Kit' },
  });
  const phone = await enrolPhone(new Client(app.url), access, { existing: found.people[0]?.id ?? '' });
  const { statements } = await phone.call(api.getOwnToSign, { params: { token } });
  const revisionId = statements[0]?.revisionId ?? '';
  const reading = await phone.call(api.getOwnReading, { params: { token, revisionId } });
  return { officer, phone, token, body: signOnBodyOf(reading) };
}

type Prepared = Awaited<ReturnType<typeof prepare>>;
const put = (phone: Client, { token, body }: Prepared, id: string) =>
  phone.send(api.signOn, { params: { token, id }, body });

/** Signs over and over, several at once, until the server is gone. */
async function signUntilKilled(app: RunningApp, prepared: Prepared, afterMs: number) {
  const phone = movedTo(app, prepared.phone);
  const answered: string[] = [];
  const unanswered: string[] = [];
  const refused: number[] = [];
  const keepSigning = async () => {
    for (;;) {
      const id = newId();
      try {
        const response = await put(phone, prepared, id);
        if (response.ok) answered.push(id);
        else refused.push(response.status);
      } catch {
        unanswered.push(id);
        return;
      }
    }
  };
  const signing = Array.from({ length: inFlight }, keepSigning);
  await wait(afterMs);
  const gone = once(app.process, 'exit');
  app.process.kill('SIGKILL');
  await gone;
  await Promise.all(signing);
  return { answered, unanswered, refused };
}

/** Milliseconds until the data folder can be taken, and given back again, after its server was killed. */
async function waitForLock(): Promise<number> {
  const started = performance.now();
  const file = join(dataDir, 'toeboard.lock');
  const [command, args] =
    process.platform === 'darwin'
      ? (['lockf', ['-s', '-t', '0', '-k', file, 'true']] as const)
      : (['flock', ['--nonblock', file, 'true']] as const);
  while (spawnSync(command, args).status !== 0 && performance.now() - started < 5000) await wait(10);
  return performance.now() - started;
}

async function missingOf(officer: Client, ids: string[]): Promise<string[]> {
  const missing: string[] = [];
  const left = [...ids];
  const look = async () => {
    for (let id = left.pop(); id; id = left.pop()) {
      const response = await officer.send(getSignOn, { params: { id } });
      if (response.status !== 200) missing.push(id);
      await response.arrayBuffer();
    }
  };
  await Promise.all(Array.from({ length: inFlight }, look));
  return missing;
}

test(
  `a server killed at any moment (${rounds} times, seed ${seed}) starts again at once and has every sign-on that it answered`,
  { timeout: 60_000 + rounds * 15_000 },
  async () => {
    const random = randomFrom(seed);
    let app = await startApp({ dataDir });
    const prepared = await prepare(app);
    const kept: string[] = [];
    for (let round = 1; round <= rounds; round += 1) {
      const afterMs = 50 + Math.floor(random() * 550);
      const { answered, unanswered, refused } = await signUntilKilled(app, prepared, afterMs);
      expect(refused, `round ${round}`).toEqual([]);

      expect(await waitForLock(), `round ${round}: ms until the lock was free`).toBeLessThan(1000);
      app = await startApp({ dataDir });

      const officer = movedTo(app, prepared.officer);
      expect(await missingOf(officer, answered), `round ${round}, killed after ${afterMs} ms`).toEqual([]);
      // What got no answer is sent again by the phone: kept or not before, it is there once afterwards.
      const phone = movedTo(app, prepared.phone);
      for (const id of unanswered) expect((await put(phone, prepared, id)).status).toBe(200);
      kept.push(...answered, ...unanswered);
    }
    expect(kept.length).toBeGreaterThan(rounds * inFlight);
    expect(await missingOf(movedTo(app, prepared.officer), kept)).toEqual([]);
    await app.stop();

    const verified = await run('verify.js', { TOEBOARD_DATA: dataDir });
    expect(verified.output).toContain('The ledger holds.');
    expect(verified.code).toBe(0);
  },
);

test('a second server on the same data ends within a second of its start, and names who has the data', async () => {
  const app = await startApp({ dataDir });
  // How long this machine takes to load the program at all: it ends right after, over its configuration.
  const bare = await run('main.js', { TOEBOARD_DATA: dataDir, PORT: 'none' });
  expect(bare.code).toBe(1);

  const second = await run('main.js', { TOEBOARD_DATA: dataDir, PORT: '0' });

  expect(second.code).toBe(1);
  expect(second.output).toContain(dataDir);
  expect(second.output).toMatch(
    new RegExp(`in use by another Toeboard process \\(process ${app.process.pid} on `),
  );
  expect(second.ms - bare.ms).toBeLessThan(1000);
  expect((await new Client(app.url).fetch('/api/session')).status).toBe(401);
  await app.stop();
});

/** Runs a built program to its end. */
async function run(program: string, env: Record<string, string>) {
  const started = performance.now();
  const { code, output } = await new Promise<{ code: number; output: string }>((resolve) => {
    execFile(
      process.execPath,
      [join(root, 'dist/server', program)],
      { cwd: root, env: { ...process.env, NODE_ENV: 'production', ...env } },
      (error, stdout, stderr) => resolve({ code: Number(error?.code ?? 0), output: stdout + stderr }),
    );
  });
  return { code, output, ms: performance.now() - started };
}
