/** A whole site as people use it: its own database, the server, the local stand-ins, workers. */
import { randomBytes } from 'node:crypto';
import { openDatabase } from '../../../server/database.ts';
import { seed } from '../../../server/seed/index.ts';
import { createTestDatabase, redisUrl } from '../../api/support/databases.ts';
import { startWorker, type TestWorker } from '../../api/support/workers.ts';
import { freePorts } from './ports.ts';
import { startProcess } from './processes.ts';

export interface BrowserSite {
  readonly url: string;
  /** Starts a worker of the site; it is ended with the site at the latest. */
  work(settings?: Readonly<Record<string, string>>): TestWorker;
  close(): Promise<void>;
}

/**
 * Opens a site with the people and models of the demonstration. Its versions are not derived, as
 * after a cancel, so that workers are free for what the test asks of them.
 */
export async function openBrowserSite(): Promise<BrowserSite> {
  const own = await createTestDatabase();
  const database = openDatabase(own.url, 2);
  try {
    await seed(database);
    await database.sequelize.query(
      `UPDATE derivations SET state = 'cancelled', stage = 'cancelled';
       UPDATE outbox SET dispatched_at = now()`,
    );
  } finally {
    await database.close();
  }
  const [port = 0, identityPort = 0, mailPort = 0] = await freePorts(3);
  const url = `http://127.0.0.1:${port}`;
  const provider = `http://127.0.0.1:${identityPort}`;
  const environment = {
    NODE_ENV: 'test',
    PORT: String(port),
    DATABASE_URL: own.url,
    REDIS_URL: redisUrl(),
    QUEUE_NAME: `test-${randomBytes(6).toString('hex')}`,
    SESSION_SECRET: 'a secret of tests, long enough to pass',
    GITHUB_CLIENT_ID: 'massieu-test',
    GITHUB_CLIENT_SECRET: randomBytes(12).toString('hex'),
    GITHUB_AUTHORIZATION_URL: `${provider}/login/oauth/authorize`,
    GITHUB_TOKEN_URL: `${provider}/login/oauth/access_token`,
    GITHUB_USER_URL: `${provider}/user`,
    GITHUB_EMAILS_URL: `${provider}/user/emails`,
    IDENTITY_PROVIDER_IS_LOCAL: 'true',
    SMTP_URL: `smtp://127.0.0.1:${mailPort}`,
    SIGN_IN_ATTEMPTS: '1000',
    LOG_LEVEL: 'warn',
    FAKE_IDENTITY_PORT: String(identityPort),
    FAKE_MAIL_PORT: String(mailPort),
  };
  const processes = [
    startProcess('server/fakes/main.ts', environment),
    startProcess('server/main.ts', environment),
  ];
  const workers: TestWorker[] = [];
  const close = async (): Promise<void> => {
    await Promise.all([...workers.map((one) => one.kill()), ...processes.map((one) => one.end())]);
    await own.drop();
  };
  try {
    const deaths = processes.map(({ death }) => death);
    await Promise.race([...deaths, Promise.all([answers(`${url}/readyz`), answers(provider)])]);
  } catch (fault) {
    await close();
    throw fault;
  }
  return {
    url,
    work(settings = {}) {
      const worker = startWorker({ environment }, settings);
      workers.push(worker);
      return worker;
    },
    close,
  };
}

const PATIENCE_MS = 60_000;

/** Waits until somebody listens at the address and is ready. */
async function answers(url: string): Promise<void> {
  const end = Date.now() + PATIENCE_MS;
  while (Date.now() < end) {
    const status = await fetch(url).then(
      (response) => response.status,
      () => 0,
    );
    if (status > 0 && status !== 503) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error(`${url} did not become ready.`);
}
