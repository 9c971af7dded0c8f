/** Sessions in PostgreSQL. */
import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import pg from 'pg';
import type { Config } from '../config.ts';
import type { Logger } from '../log.ts';

const WEEK_MS = 7 * 24 * 3600 * 1000;
const PRUNE_SECONDS = 3600;

export interface SessionStore {
  readonly store: session.Store;
  close(): Promise<void>;
}

/** The store on a small pool of its own: a slow query of the application never holds up a session. */
export function openSessionStore(databaseUrl: string, log: Logger): SessionStore {
  const pool = new pg.Pool({ connectionString: databaseUrl, max: 5 });
  // Without a listener, a database that restarts would take the whole process with it.
  pool.on('error', (error) => {
    log.warn({ err: error }, 'a connection of the sessions was lost');
  });
  const Store = connectPgSimple(session);
  const store = new Store({
    pool,
    tableName: 'sessions',
    pruneSessionInterval: PRUNE_SECONDS,
    errorLog: (...words: unknown[]) => {
      log.warn({ words: words.map(String) }, 'the session store');
    },
  });
  return {
    store,
    async close() {
      store.close();
      await pool.end();
    },
  };
}

export function sessions(
  config: Pick<Config, 'SESSION_SECRET' | 'publicUrl'>,
  store: session.Store,
): RequestHandler {
  return session({
    name: 'massieu',
    secret: config.SESSION_SECRET,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    store,
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: config.publicUrl.startsWith('https:'),
      maxAge: WEEK_MS,
    },
  });
}
