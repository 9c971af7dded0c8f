/**
 * The two services that Massieu stands on, PostgreSQL and Redis: those named by DATABASE_URL and
 * REDIS_URL where these are set, else our own.
 */
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { asksForPassword, installDebian, which } from './debian.mjs';
import { Fault } from './fault.mjs';
import {
  randomSecret,
  readJson,
  secrets,
  servicesFolder,
  STATE,
  writeSecretFile,
} from './folder.mjs';
import { keepService } from './keepService.mjs';
import { asksDatabase, postgresPrograms, startPostgres } from './postgres.mjs';
import { ensurePackages } from './packages.mjs';
import { account } from './process.mjs';
import { ping, startRedis } from './redis.mjs';
import { step } from './say.mjs';

const INSTEAD = 'Or set DATABASE_URL and REDIS_URL to a PostgreSQL and a Redis that exist.';

/**
 * Install the npm packages, and from Debian what is missing of the programs wanted; both at once,
 * since each mostly waits for the network.
 */
export async function ensureEverything({ postgres, redis, chromium = false }) {
  const packages = [
    ...(postgres && postgresPrograms() === undefined ? ['postgresql'] : []),
    ...(redis && which('redis-server') === undefined ? ['redis-server'] : []),
    ...(chromium && which('chromium') === undefined ? ['chromium'] : []),
  ];
  const install = async () => {
    if (packages.length > 0) await installDebian(packages, INSTEAD);
  };
  if (packages.length > 0 && asksForPassword()) {
    await install();
    await ensurePackages();
  } else {
    const outcomes = await Promise.allSettled([ensurePackages(), install()]);
    const failure = outcomes.find(({ status }) => status === 'rejected');
    if (failure !== undefined) throw failure.reason;
  }
}

/** The users as which the services run when we are root. */
function serviceUsers() {
  const nobody = account('nobody');
  const users = { postgres: account('postgres') ?? nobody, redis: account('redis') ?? nobody };
  if (process.getuid?.() === 0 && users.postgres === null) {
    throw new Fault(
      'PostgreSQL does not run as root, and there is no user postgres here.',
      'Create one (adduser --system postgres), or start as an ordinary user.',
    );
  }
  return users;
}

/** The address without its password, for showing. */
export function withoutPassword(url) {
  try {
    const { protocol, host, pathname } = new URL(url);
    return `${protocol}//${host}${pathname}`;
  } catch {
    return url;
  }
}

async function existingDatabase(url) {
  await step(
    'Using the PostgreSQL of DATABASE_URL',
    async () => {
      const error = await asksDatabase(url);
      if (error !== undefined) {
        throw new Fault(
          `The PostgreSQL of DATABASE_URL does not answer: ${error.message}`,
          'Start it or correct DATABASE_URL; without DATABASE_URL Massieu starts one of its own.',
        );
      }
    },
    () => withoutPassword(url),
  );
  return { url, stop: async () => undefined };
}

async function existingRedis(url) {
  await step(
    'Using the Redis of REDIS_URL',
    async () => {
      // TLS is left to the application's own client.
      const answer = url.startsWith('rediss:') ? 'PONG' : await ping(url);
      if (answer !== 'PONG') {
        throw new Fault(
          `The Redis of REDIS_URL does not answer: ${answer}`,
          'Start it or correct REDIS_URL; without REDIS_URL Massieu starts one of its own.',
        );
      }
    },
    () => withoutPassword(url),
  );
  return { url, stop: async () => undefined };
}

/**
 * PostgreSQL and Redis whose data stay, for `npm start` and `npm run dev`.
 *
 * @param {(error: unknown) => void} onLoss told when one of them has died for good
 */
export async function lastingServices(onLoss) {
  const { DATABASE_URL, REDIS_URL } = process.env;
  const users = serviceUsers();
  const folder = DATABASE_URL && REDIS_URL ? STATE : servicesFolder([users.postgres, users.redis]);
  // Beside the cluster, whose password it is, wherever that lies.
  const secret = secrets(['databasePassword', 'redisPassword'], folder);
  const portsPath = join(STATE, 'ports.json');
  const ports = readJson(portsPath);

  const postgres = DATABASE_URL
    ? await existingDatabase(DATABASE_URL)
    : await step(
        'Starting PostgreSQL',
        () =>
          keepService({
            name: 'PostgreSQL',
            onLoss,
            launch: (port = ports.postgres) =>
              startPostgres({
                folder,
                user: users.postgres,
                password: secret.databasePassword,
                durable: true,
                port,
              }),
          }),
        ({ version, port }) => `version ${version} on 127.0.0.1:${port}, data in ${folder}`,
      );
  const redis = REDIS_URL
    ? await existingRedis(REDIS_URL)
    : await step(
        'Starting Redis',
        () =>
          keepService({
            name: 'Redis',
            onLoss,
            launch: (port = ports.redis) =>
              startRedis({
                program: which('redis-server'),
                folder,
                user: users.redis,
                password: secret.redisPassword,
                durable: true,
                port,
              }),
          }),
        ({ port }) => `on 127.0.0.1:${port}`,
      );
  writeSecretFile(
    portsPath,
    `${JSON.stringify({ ...readJson(portsPath), postgres: postgres.port ?? ports.postgres, redis: redis.port ?? ports.redis })}\n`,
  );
  return { postgres, redis };
}

/** Empty PostgreSQL and Redis in a temporary folder, for tests; `stop` removes everything. */
export async function throwAwayServices() {
  const users = serviceUsers();
  const folder = mkdtempSync('/tmp/massieu-test-');
  chmodSync(folder, 0o711);
  const password = randomSecret();
  const started = [];
  const stop = async () => {
    for (const service of started.reverse()) await service.stop();
    rmSync(folder, { recursive: true, force: true });
  };
  try {
    const postgres = await step('Starting a throw-away PostgreSQL', () =>
      startPostgres({ folder, user: users.postgres, password, durable: false }),
    );
    started.push(postgres);
    const redis = await step('Starting a throw-away Redis', () =>
      startRedis({
        program: which('redis-server'),
        folder,
        user: users.redis,
        password,
        durable: false,
      }),
    );
    started.push(redis);
    return { databaseUrl: postgres.url, redisUrl: redis.url, folder, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}
