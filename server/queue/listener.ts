/** A connection that hears what PostgreSQL announces, and comes back when it is lost. */
import pg from 'pg';
import type { Logger } from '../log.ts';

export interface Listener {
  close(): Promise<void>;
}

const RECONNECT_MS = 1_000;

/**
 * Calls `heard` for every notification on the channel, and `reconnected` whenever the connection
 * stands anew: what was announced in between has to be looked up.
 */
export async function listen(
  url: string,
  channel: 'derivation_event' | 'outbox',
  { heard, reconnected }: { heard: (payload: string) => void; reconnected?: () => void },
  log: Logger,
): Promise<Listener> {
  let client: pg.Client | undefined;
  let isClosed = false;
  let timer: NodeJS.Timeout | undefined;
  /** A connection lost while it is being made is reported twice, and made once. */
  const connectLater = (): void => {
    clearTimeout(timer);
    timer = setTimeout(again, RECONNECT_MS);
  };
  const connect = async (): Promise<void> => {
    const next = new pg.Client({ connectionString: url });
    next.on('notification', ({ payload }) => {
      heard(payload ?? '');
    });
    const lost = (): void => {
      if (isClosed || client !== next) return;
      client = undefined;
      connectLater();
    };
    next.on('error', lost);
    next.on('end', lost);
    await next.connect();
    client = next;
    await next.query(`LISTEN ${channel}`);
  };
  const again = (): void => {
    connect().then(reconnected, (error: unknown) => {
      log.warn({ err: error, channel }, 'cannot listen to the database, trying again');
      if (!isClosed) connectLater();
    });
  };
  await connect();
  return {
    async close() {
      isClosed = true;
      clearTimeout(timer);
      await client?.end();
    },
  };
}
