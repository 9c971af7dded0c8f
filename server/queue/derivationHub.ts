/**
 * From the table of derivation events to the browsers that follow a model. The table is the only
 * memory: an announcement says that there is something to read, and a browser that comes back names
 * the last event that it has.
 */
import { QueryTypes } from 'sequelize';
import { derivationEventSchema, type DerivationEvent } from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import type { Logger } from '../log.ts';
import { describeProgress } from '../services/describe.ts';
import { listen, type Listener } from './listener.ts';

export interface NumberedEvent {
  readonly id: string;
  readonly data: DerivationEvent;
}

export interface Follower {
  tell(event: NumberedEvent): void;
  /** The hub closes, and nothing more will be told. */
  end(): void;
}

interface Following extends Follower {
  readonly modelId: string;
  last: string;
  /** Reads are one after the other, so that no event is told twice. */
  reading: Promise<void>;
}

export interface DerivationHub {
  /**
   * Tells all events of the model after the given one. Without one, tells first how its latest
   * version and all that are being derived stand, then every event from there on, so that nothing
   * is missed between a page's first look and this. The result ends it.
   */
  follow(modelId: string, after: string | undefined, follower: Follower): Promise<() => void>;
  close(): Promise<void>;
}

const AT_ONCE = 200;

interface EventRecord {
  id: string;
  version_id: string;
  version_number: number;
  derivation: unknown;
}

/** Where the events of a model have got to, and how its derivations stand at least as late. */
async function standOf({ sequelize, models }: Database, modelId: string): Promise<NumberedEvent[]> {
  // The number is read first: what happens after it is told again, which does no harm.
  const [row] = await sequelize.query<{ last: string | null }>(
    'SELECT max(id) AS last FROM derivation_events WHERE model_id = :modelId',
    { replacements: { modelId }, type: QueryTypes.SELECT },
  );
  const id = row?.last ?? '0';
  const versions = await models.Version.findAll({
    where: { modelId },
    attributes: ['id', 'number'],
    include: [{ association: 'derivation', attributes: { exclude: ['result', 'verification'] } }],
    order: [['number', 'DESC']],
  });
  return versions.flatMap(({ id: versionId, number, derivation }, index) => {
    const isOpen = ['queued', 'deriving', 'verifying'].includes(derivation?.state ?? '');
    if (!derivation || (index > 0 && !isOpen)) return [];
    const data = { versionId, versionNumber: number, derivation: describeProgress(derivation) };
    return [{ id, data }];
  });
}

export async function openDerivationHub(
  database: Database,
  url: string,
  log: Logger,
): Promise<DerivationHub> {
  const followings = new Map<string, Set<Following>>();

  const read = async (following: Following): Promise<void> => {
    for (;;) {
      const rows = await database.sequelize.query<EventRecord>(
        `SELECT id, version_id, version_number, derivation FROM derivation_events
         WHERE model_id = :modelId AND id > :last ORDER BY id LIMIT ${AT_ONCE}`,
        {
          replacements: { modelId: following.modelId, last: following.last },
          type: QueryTypes.SELECT,
        },
      );
      for (const row of rows) {
        following.last = row.id;
        const data = derivationEventSchema.parse({
          versionId: row.version_id,
          versionNumber: row.version_number,
          derivation: row.derivation,
        });
        following.tell({ id: row.id, data });
      }
      if (rows.length < AT_ONCE) return;
    }
  };
  const wake = (following: Following): void => {
    following.reading = following.reading
      .then(() => read(following))
      .catch((error: unknown) => {
        log.error({ err: error }, 'reading derivation events failed');
      });
  };
  const wakeAll = (modelId: string): void => {
    for (const following of followings.get(modelId) ?? []) wake(following);
  };

  const listener: Listener = await listen(
    url,
    'derivation_event',
    {
      heard: wakeAll,
      reconnected: () => {
        for (const modelId of followings.keys()) wakeAll(modelId);
      },
    },
    log,
  );

  return {
    async follow(modelId, after, follower) {
      const stand = after === undefined ? await standOf(database, modelId) : [];
      for (const event of stand) follower.tell(event);
      const following: Following = {
        modelId,
        last: after ?? stand[0]?.id ?? '0',
        reading: Promise.resolve(),
        tell: (event) => {
          follower.tell(event);
        },
        end: () => {
          follower.end();
        },
      };
      const group = followings.get(modelId) ?? new Set();
      followings.set(modelId, group.add(following));
      wake(following);
      return () => {
        group.delete(following);
        if (group.size === 0 && followings.get(modelId) === group) followings.delete(modelId);
      };
    },
    async close() {
      await listener.close();
      for (const group of followings.values()) for (const following of group) following.end();
      followings.clear();
    },
  };
}
