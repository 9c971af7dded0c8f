/**
 * From the table of derivation events to the browsers that follow a model. The table is the only
 * memory: an announcement says that there is something to read, and a browser that comes back names
 * the last event that it has.
 */
import { QueryTypes } from 'sequelize';
import { derivationEventSchema, type DerivationEvent } from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import type { Logger } from '../log.ts';
import { listen, type Listener } from './listener.ts';

export interface NumberedEvent {
  readonly id: string;
  readonly data: DerivationEvent;
}

interface Follower {
  last: string;
  readonly tell: (event: NumberedEvent) => void;
  /** Reads are one after the other, so that no event is told twice. */
  reading: Promise<void>;
}

export interface DerivationHub {
  /** Tells all events after the given one (else only new ones); the result ends it. */
  follow(
    modelId: string,
    after: string | undefined,
    tell: (event: NumberedEvent) => void,
  ): Promise<() => void>;
  close(): Promise<void>;
}

const AT_ONCE = 200;

export async function openDerivationHub(
  database: Database,
  url: string,
  log: Logger,
): Promise<DerivationHub> {
  const followers = new Map<string, Set<Follower>>();

  const read = async (modelId: string, follower: Follower): Promise<void> => {
    for (;;) {
      const rows = await database.sequelize.query<{
        id: string;
        version_id: string;
        version_number: number;
        derivation: unknown;
      }>(
        `SELECT id, version_id, version_number, derivation FROM derivation_events
         WHERE model_id = :modelId AND id > :last ORDER BY id LIMIT ${AT_ONCE}`,
        { replacements: { modelId, last: follower.last }, type: QueryTypes.SELECT },
      );
      for (const row of rows) {
        follower.last = row.id;
        const data = derivationEventSchema.parse({
          versionId: row.version_id,
          versionNumber: row.version_number,
          derivation: row.derivation,
        });
        follower.tell({ id: row.id, data });
      }
      if (rows.length < AT_ONCE) return;
    }
  };
  const wake = (modelId: string, follower: Follower): void => {
    follower.reading = follower.reading
      .then(() => read(modelId, follower))
      .catch((error: unknown) => {
        log.error({ err: error }, 'reading derivation events failed');
      });
  };
  const wakeAll = (modelId: string): void => {
    for (const follower of followers.get(modelId) ?? []) wake(modelId, follower);
  };

  const listener: Listener = await listen(
    url,
    'derivation_event',
    {
      heard: wakeAll,
      reconnected: () => {
        for (const modelId of followers.keys()) wakeAll(modelId);
      },
    },
    log,
  );

  return {
    async follow(modelId, after, tell) {
      const follower: Follower = { last: after ?? '0', tell, reading: Promise.resolve() };
      if (after === undefined) {
        const [row] = await database.sequelize.query<{ last: string | null }>(
          'SELECT max(id) AS last FROM derivation_events WHERE model_id = :modelId',
          { replacements: { modelId }, type: QueryTypes.SELECT },
        );
        follower.last = row?.last ?? '0';
      }
      const group = followers.get(modelId) ?? new Set();
      followers.set(modelId, group.add(follower));
      wake(modelId, follower);
      return () => {
        group.delete(follower);
        if (group.size === 0) followers.delete(modelId);
      };
    },
    close: () => listener.close(),
  };
}
