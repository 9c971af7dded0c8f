/** The application as a function of its settings and of what it works with; it does not listen. */
import { randomUUID } from 'node:crypto';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import compression from 'compression';
import express, { type Express, type RequestHandler } from 'express';
import type { Queue } from 'bullmq';
import type { Store } from 'express-session';
import type { Redis } from 'ioredis';
import { pinoHttp } from 'pino-http';
import type { Config } from './config.ts';
import type { Database } from './database.ts';
import type { Logger } from './log.ts';
import type { Mailer } from './mail/mailer.ts';
import { createPassport } from './middleware/authentication.ts';
import { csrf } from './middleware/csrf.ts';
import { nothingHere, problems } from './middleware/problems.ts';
import { security } from './middleware/security.ts';
import { sessions } from './middleware/sessions.ts';
import { storableText } from './middleware/storableText.ts';
import type { DerivationHub } from './queue/derivationHub.ts';
import type { DerivationJob } from './queue/derivationQueue.ts';
import { eventRoutes } from './routes/events.ts';
import { groupRoutes } from './routes/groups.ts';
import { healthRoutes } from './routes/health.ts';
import { identityRoutes } from './routes/identity.ts';
import { modelRoutes } from './routes/models.ts';
import { sessionRoutes } from './routes/session.ts';

export interface Dependencies {
  readonly database: Database;
  readonly redis: Redis;
  readonly queue: Queue<DerivationJob>;
  readonly sessionStore: Store;
  readonly mailer: Mailer;
  readonly hub: DerivationHub;
  readonly log: Logger;
  /** Folder of the built client; undefined where something else serves the pages. */
  readonly clientFolder?: string | undefined;
  /** Serves the pages from the sources while developing. */
  readonly development?: RequestHandler | undefined;
}

/** Hashed files for a year; the page itself is asked for each time. */
function pages(folder: string): RequestHandler[] {
  const index = join(folder, 'index.html');
  return [
    express.static(folder, {
      index: false,
      setHeaders(response, path) {
        const isHashed = path.includes(`${join(folder, 'assets')}`);
        response.setHeader(
          'cache-control',
          isHashed ? 'public, max-age=31536000, immutable' : 'no-cache',
        );
      },
    }),
    (request, response, next) => {
      const wantsPage = request.method === 'GET' && request.accepts('html') !== false;
      if (!wantsPage || /^\/(api|auth|assets)\//.test(request.path)) {
        next();
        return;
      }
      response.setHeader('cache-control', 'no-cache');
      response.sendFile(index);
    },
  ];
}

export function createApp(config: Config, dependencies: Dependencies): Express {
  const { database, redis, queue, sessionStore, mailer, hub, log, clientFolder, development } =
    dependencies;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.TRUSTED_PROXIES);
  app.use(
    pinoHttp({
      logger: log,
      genReqId: (request, response) => {
        const given = request.headers['x-request-id'];
        const id = typeof given === 'string' && /^[\w-]{8,64}$/.test(given) ? given : randomUUID();
        response.setHeader('x-request-id', id);
        return id;
      },
      customLogLevel: (_request, response, error) => {
        if (error || response.statusCode >= 500) return 'error';
        return response.statusCode >= 400 ? 'warn' : 'info';
      },
      // Asked for all the time, by machines and by every page.
      autoLogging: { ignore: ({ url = '' }) => /^\/(healthz|readyz|assets\/)/.test(url) },
      serializers: {
        req: (request: { method: string; url: string; id: unknown }) => ({
          id: request.id,
          method: request.method,
          // Tokens of mailed links stand in addresses; the log gets the path alone.
          path: request.url.replace(/\?.*$/, '').replace(/(password-resets\/).*/, '$1…'),
        }),
        res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      },
    }),
  );
  app.use(security(config, development !== undefined));
  app.use(healthRoutes(database, redis, queue));
  app.use(
    compression({
      filter: (request, response) =>
        response.getHeader('content-type') !== 'text/event-stream' &&
        compression.filter(request, response),
    }),
  );

  const passport = createPassport(config, database);
  const signedIn: RequestHandler[] = [
    sessions(config, sessionStore),
    passport.initialize() as RequestHandler,
    passport.session() as RequestHandler,
  ];
  app.use('/auth', ...signedIn, identityRoutes(config, passport));
  app.use(
    '/api',
    (_request, response, next) => {
      response.setHeader('cache-control', 'no-store');
      next();
    },
    express.json({ limit: '512kb' }),
    storableText,
    ...signedIn,
    csrf(config.publicUrl),
    sessionRoutes({ config, database, redis, mailer, passport }),
    groupRoutes(database),
    modelRoutes(database),
    eventRoutes(database, hub),
    nothingHere,
  );
  if (development) app.use(development);
  else if (clientFolder !== undefined && existsSync(clientFolder)) app.use(...pages(clientFolder));
  app.use(nothingHere);
  app.use(problems);
  return app;
}
