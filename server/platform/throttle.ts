import type { Pool } from 'pg';
import { RateLimiterPostgres, type RateLimiterRes } from 'rate-limiter-flexible';
import { Refusal } from '#shared/kernel/refusal.ts';

/** How often something may be tried: `points` within `seconds`, counted in the database so that several servers share it. */
export const limits = {
  signInEmail: { points: 8, seconds: 900 },
  signInAddress: { points: 60, seconds: 900 },
  passwordReset: { points: 5, seconds: 3600 },
  dayCode: { points: 8, seconds: 600 },
  dayCodeSite: { points: 120, seconds: 3600 },
} as const;

export type LimitName = keyof typeof limits;

export type Throttles = {
  /** Counts a try; refuses with the wait once there were too many. Never call it inside a transaction: it has a connection of its own. */
  spend: (name: LimitName, key: string) => Promise<void>;
  /** Forgets the tries, after one that was right. */
  forgive: (name: LimitName, key: string) => Promise<void>;
  /** Takes back one try that was right, and leaves other people's wrong ones counted. */
  giveBack: (name: LimitName, key: string) => Promise<void>;
};

export function createThrottles(pool: Pool): Throttles {
  const limiterOf = (name: LimitName) =>
    new RateLimiterPostgres({
      storeClient: unnamed(pool),
      storeType: 'pool',
      tableName: 'throttles',
      tableCreated: true,
      keyPrefix: name,
      points: limits[name].points,
      duration: limits[name].seconds,
      clearExpiredByTimeout: false,
    });
  const limiters = new Map<LimitName, RateLimiterPostgres>();
  const limiter = (name: LimitName) => {
    const known = limiters.get(name) ?? limiterOf(name);
    limiters.set(name, known);
    return known;
  };
  return {
    async spend(name, key) {
      try {
        await limiter(name).consume(key);
      } catch (reason) {
        if (reason instanceof Error) throw reason;
        const seconds = Math.ceil((reason as RateLimiterRes).msBeforeNext / 1000);
        throw new Refusal('tooMany', `Too many tries. Wait ${waitWords(seconds)} and try again.`, {
          extra: { retryAfterSeconds: seconds },
        });
      }
    },
    async forgive(name, key) {
      await limiter(name).delete(key);
    },
    async giveBack(name, key) {
      await limiter(name).reward(key);
    },
  };
}

/** The embedded engine's connections share one backend, where a statement prepared under a name stands in everybody's way. */
const unnamed = (pool: Pool) => ({
  query: ({ text, values }: { name?: string; text: string; values: unknown[] }) => pool.query(text, values),
});

function waitWords(seconds: number): string {
  return seconds <= 90 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;
}
