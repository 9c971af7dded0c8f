/**
 * `npm start` (built, as in production) and `npm run dev` (from the sources, with hot reload): set
 * up whatever is missing, start the services, the local stand-ins, the server and the worker, and
 * keep them running until Ctrl-C.
 *
 * Only Node's built-ins may be imported before the npm packages are there.
 */
import { join } from 'node:path';
import { buildClient, buildNode } from './operate/build.mjs';
import { Fault, report } from './operate/fault.mjs';
import { ownFolder, readJson, ROOT, secrets, STATE, writeSecretFile } from './operate/folder.mjs';
import { requireNode } from './operate/packages.mjs';
import { freePort, freePortFrom, isFree } from './operate/port.mjs';
import { endAll, run } from './operate/process.mjs';
import { claim, parentOf, release, whoRuns } from './operate/running.mjs';
import { say, since, step } from './operate/say.mjs';
import { ensureEverything, lastingServices } from './operate/services.mjs';
import { didNotComeUp, keepRunning } from './operate/supervise.mjs';
import { until } from './operate/wait.mjs';

const FIRST_PORT = 8460;
const READY_MS = 60_000;
const forDevelopment = process.argv.includes('--dev');
const portsPath = join(STATE, 'ports.json');

/** Ends processes in the order in which they depend on each other. */
const stops = [];
let leaving = false;

async function leave(status) {
  if (leaving) return;
  leaving = true;
  for (const stop of stops.reverse()) await stop().catch((error) => report(error, 'While ending'));
  await endAll();
  release();
  if (status === 0) say('Massieu has ended.');
  process.exit(status);
}

/** A signal ends everything in order; an impatient second one does not wait. */
function listenForTheEnd() {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    process.on(signal, () => {
      // Children carry a parent-death signal, so that ending at once ends them too.
      if (leaving) process.exit(1);
      say('\nEnding Massieu …');
      void leave(0);
    });
  }
  // npm, which started us by way of a shell, may be killed without handing the signal on.
  if (process.env.npm_lifecycle_event !== undefined) {
    const ancestors = () => `${process.ppid} ${parentOf(process.ppid)}`;
    const first = ancestors();
    setInterval(() => {
      if (ancestors() !== first) void leave(0);
    }, 1000).unref();
  }
}

/** The port of the application: PORT, else the one of the last start, else the first free one. */
async function choosePort() {
  const { PORT } = process.env;
  if (PORT === undefined || PORT === '') {
    const { application } = readJson(portsPath);
    return application !== undefined && (await isFree(application))
      ? application
      : freePortFrom(FIRST_PORT);
  }
  const port = Number(PORT);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new Fault(`PORT is '${PORT}', which is no port.`, 'Set it to a number from 1 to 65535.');
  }
  if (!(await isFree(port))) {
    throw new Fault(
      `Port ${port}, which PORT asks for, is in use by another program.`,
      'Choose another PORT, or leave it away: a free one is then found.',
    );
  }
  return port;
}

/** Settings of the identity provider: the real one where it is configured, else the local one. */
function identitySettings(fakePort, secret) {
  if (process.env.GITHUB_CLIENT_ID && process.env.GITHUB_CLIENT_SECRET) {
    return { IDENTITY_PROVIDER_IS_LOCAL: 'false' };
  }
  const provider = `http://127.0.0.1:${fakePort}`;
  return {
    IDENTITY_PROVIDER_IS_LOCAL: 'true',
    GITHUB_CLIENT_ID: 'massieu-local',
    GITHUB_CLIENT_SECRET: secret,
    GITHUB_AUTHORIZATION_URL: `${provider}/login/oauth/authorize`,
    GITHUB_TOKEN_URL: `${provider}/login/oauth/access_token`,
    GITHUB_USER_URL: `${provider}/user`,
    GITHUB_EMAILS_URL: `${provider}/user/emails`,
  };
}

/** Node's parameters for an entry of the application, from the sources or as built. */
function entry(path, ...parameters) {
  return forDevelopment
    ? ['--import', 'tsx', join(ROOT, `${path}.ts`), ...parameters]
    : ['--enable-source-maps', join(ROOT, 'dist/node', `${path}.js`), ...parameters];
}

async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(3000) })).ok;
  } catch {
    return false;
  }
}

/** When Massieu runs here already, say where, and end in peace. */
function leaveToOther(other) {
  if (other === null) return;
  say(`Massieu already runs in this folder (process ${other.pid}): ${other.url}`);
  say(`End it there with Ctrl-C, or with: kill ${other.pid}`);
  process.exit(0);
}

async function main() {
  const beginning = performance.now();
  requireNode();
  leaveToOther(whoRuns());
  const port = await choosePort();
  const address = `http://127.0.0.1:${port}`;
  leaveToOther(claim(address));
  listenForTheEnd();
  say('Starting Massieu');
  await ensureEverything({ postgres: !process.env.DATABASE_URL, redis: !process.env.REDIS_URL });

  const services = await lastingServices((error) => {
    if (leaving) return;
    report(error, 'Massieu must end');
    void leave(1);
  });
  stops.push(services.postgres.stop, services.redis.stop);
  const ports = readJson(portsPath);
  const fakePort = await freePort(ports.fakes);
  const mailPort = await freePort(ports.mail);
  writeSecretFile(
    portsPath,
    `${JSON.stringify({ ...ports, application: port, fakes: fakePort, mail: mailPort })}\n`,
  );

  if (!forDevelopment) {
    const built = await step(
      'Building the application',
      async () => [await buildNode(), await buildClient()],
      (parts) => (parts.includes(true) ? '' : 'nothing has changed'),
    );
    void built;
  }

  const secret = secrets(['sessionSecret', 'identitySecret']);
  const environment = {
    ...process.env,
    NODE_ENV: forDevelopment ? 'development' : 'production',
    DATABASE_URL: services.postgres.url,
    REDIS_URL: services.redis.url,
    SESSION_SECRET: process.env.SESSION_SECRET || secret.sessionSecret,
    HOST: '127.0.0.1',
    PORT: String(port),
    PUBLIC_URL: process.env.PUBLIC_URL || address,
    SMTP_URL: process.env.SMTP_URL || `smtp://127.0.0.1:${mailPort}`,
    ...identitySettings(fakePort, secret.identitySecret),
  };

  const logs = ownFolder(join(STATE, 'logs'), 0o700);
  await step('Preparing the database and the demonstration', () =>
    run(process.execPath, entry('server/migrate', '--seed'), {
      cwd: ROOT,
      env: environment,
      fails: (tail) => new Fault('The database could not be prepared.', `It said:\n${tail}`),
    }),
  );

  const keep = (name, parameters) => {
    const log = join(logs, `${name.replaceAll(' ', '-')}.log`);
    const kept = keepRunning({
      name,
      parameters,
      log,
      cwd: ROOT,
      env: {
        ...environment,
        FAKE_IDENTITY_PORT: String(fakePort),
        FAKE_MAIL_PORT: String(mailPort),
      },
      echo: forDevelopment && name !== 'stand-ins',
    });
    stops.push(kept.stop);
    return { ...kept, log };
  };
  await step('Starting the server and the worker', async () => {
    keep('stand-ins', entry('server/fakes/main'));
    const server = keep('server', entry('server/main', ...(forDevelopment ? ['--dev'] : [])));
    const worker = keep('worker', entry('worker/main'));
    const ready = await until(async () => {
      if (server.hasDied()) throw didNotComeUp('server', server.log);
      if (worker.hasDied()) throw didNotComeUp('worker', worker.log);
      return answers(`${address}/readyz`);
    }, READY_MS);
    if (ready === undefined) throw didNotComeUp('server', server.log);
  });

  say(`\nMassieu is ready after ${since(beginning)}: ${environment.PUBLIC_URL}`);
  if (environment.IDENTITY_PROVIDER_IS_LOCAL === 'true') {
    say('Choose "Sign in with GitHub": a local stand-in offers the people of the demonstration,');
    say('which is invented. Nothing leaves this machine.');
  }
  if (!process.env.SMTP_URL) say(`Mail is kept at http://127.0.0.1:${fakePort}/letters`);
  say(`Logs are in ${logs}. Ctrl-C ends everything.`);
}

main().catch((error) => {
  if (leaving) return;
  report(error, 'Massieu could not start');
  void leave(1);
});
