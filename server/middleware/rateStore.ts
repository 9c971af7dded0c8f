/**
 * Counts of attempts in Redis, so that several servers share them. While Redis does not answer,
 * each server counts for itself: signing in must neither stop nor become unlimited by that.
 */
import { createHash } from 'node:crypto';
import {
  MemoryStore,
  type ClientRateLimitInfo,
  type Options,
  type Store,
} from 'express-rate-limit';
import type { Redis } from 'ioredis';

export function createRateStore(redis: Redis, prefix: string): Store {
  const memory = new MemoryStore();
  let windowMs = 0;
  // Accounts are named by mail addresses, which have no place in Redis.
  const nameOf = (key: string): string =>
    `${prefix}:${createHash('sha256').update(key).digest('base64url')}`;
  const answers = (): boolean => redis.status === 'ready';

  return {
    prefix,
    localKeys: false,
    init(options: Options) {
      windowMs = options.windowMs;
      memory.init(options);
    },
    async increment(key): Promise<ClientRateLimitInfo> {
      if (!answers()) return memory.increment(key);
      const name = nameOf(key);
      const replies = await redis
        .multi()
        .incr(name)
        .pexpire(name, windowMs, 'NX')
        .pttl(name)
        .exec();
      const [hits, , left] = (replies ?? []).map(([, reply]) => Number(reply));
      return {
        totalHits: hits ?? 1,
        resetTime: new Date(Date.now() + (left ?? windowMs)),
      };
    },
    async decrement(key) {
      if (!answers()) await memory.decrement(key);
      else await redis.decr(nameOf(key));
    },
    async resetKey(key) {
      if (!answers()) await memory.resetKey(key);
      else await redis.del(nameOf(key));
    },
  };
}
