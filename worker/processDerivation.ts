/** One job of the queue: read the version, let a child derive it, write what came of it. */
import { createHash } from 'node:crypto';
import type { Database } from '../server/database.ts';
import type { Logger } from '../server/log.ts';
import type { DerivationRow } from '../server/models/derivation.ts';
import type { VersionRow } from '../server/models/version.ts';
import type { DerivationJob } from '../server/queue/derivationQueue.ts';
import { announce } from '../server/services/derivations.ts';
import { recordEvent } from '../server/services/groups.ts';
import { runChild, type Ending, type Limits } from './runChild.ts';

/** Progress is written at most this often; a change of stage waits for its turn. */
const WRITE_EVERY_MS = 150;
const LOOK_FOR_CANCEL_MS = 250;

type Change = Partial<
  Pick<
    DerivationRow,
    | 'state'
    | 'progress'
    | 'stage'
    | 'fault'
    | 'result'
    | 'resultHash'
    | 'verification'
    | 'verificationStatus'
  >
>;

const SETTLED: readonly string[] = ['complete', 'failed', 'cancelled'];

/**
 * Writes a change of a derivation of this round, with its announcement, in one transaction. False
 * where the derivation has been settled or put into the queue anew meanwhile.
 */
async function write(
  database: Database,
  version: VersionRow,
  { derivationId, round }: DerivationJob,
  change: Change,
): Promise<boolean> {
  return database.sequelize.transaction(async (transaction) => {
    const derivation = await database.models.Derivation.findByPk(derivationId, {
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!derivation || derivation.round !== round || SETTLED.includes(derivation.state))
      return false;
    await derivation.update(change, { transaction });
    await announce(database, derivation, version, transaction);
    if (change.state && SETTLED.includes(change.state)) {
      const model = await database.models.Model.findByPk(version.modelId, {
        include: 'notebook',
        transaction,
      });
      await recordEvent(
        database,
        {
          groupId: model?.notebook?.groupId ?? '',
          personId: null,
          kind: `derivation-${change.state}` as 'derivation-complete',
          modelId: version.modelId,
          title: model?.title ?? '',
          versionNumber: version.number,
        },
        transaction,
      );
    }
    return true;
  });
}

/**
 * Does the job; doing it again is harmless. Throws where trying again may help, which leaves that
 * to the queue.
 */
export async function processDerivation(
  database: Database,
  job: DerivationJob,
  limits: Limits,
  log: Logger,
  shutdown: AbortSignal,
): Promise<void> {
  const derivation = await database.models.Derivation.findByPk(job.derivationId, {
    include: 'version',
  });
  const { version } = derivation ?? {};
  if (!derivation || !version || derivation.round !== job.round) return;
  const standing = derivation.resultHash;
  const begun = await write(database, version, job, {
    state: 'deriving',
    progress: 0,
    stage: 'reading the formulation',
  });
  if (!begun) return;

  const ending = await watch(database, version, job, limits, shutdown);
  if (shutdown.aborted) throw new Error('the worker is ending; another one takes the job');
  switch (ending.kind) {
    case 'outcome': {
      const { result, verification, verificationStatus } = ending.outcome;
      const resultHash = createHash('sha256').update(result, 'utf8').digest('hex');
      if (standing !== null && standing !== resultHash) {
        await write(database, version, job, {
          state: 'failed',
          stage: 'compared with the result that stands',
          fault:
            'Deriving again gave another result than the one that stands. The version keeps its first result; tell the site administrator.',
        });
        log.error(
          { versionId: version.id, standing, resultHash },
          'a derivation is not repeatable',
        );
        return;
      }
      await write(database, version, job, {
        state: 'complete',
        progress: 1,
        stage: standing === null ? 'complete' : 'complete, and byte for byte as before',
        result,
        resultHash,
        verification,
        verificationStatus,
      });
      return;
    }
    case 'fault':
      await write(database, version, job, { state: 'failed', fault: ending.message });
      return;
    case 'cancelled':
      await write(database, version, job, { state: 'cancelled', stage: 'cancelled' });
      return;
    case 'died':
      throw new Error(ending.message);
  }
}

/** Writes that a job has failed for good, after the queue has tried often enough. */
export async function giveUp(
  database: Database,
  job: DerivationJob,
  reason: string,
): Promise<void> {
  const derivation = await database.models.Derivation.findByPk(job.derivationId, {
    include: 'version',
  });
  if (!derivation?.version) return;
  await write(database, derivation.version, job, {
    state: 'failed',
    fault: `The derivation was tried several times and ended each time: ${reason}. Try again; if it stays, tell the site administrator.`,
  });
}

/** Runs the child while its progress is written and the wish to cancel is looked for. */
async function watch(
  database: Database,
  version: VersionRow,
  job: DerivationJob,
  limits: Limits,
  shutdown: AbortSignal,
): Promise<Ending> {
  const cancel = new AbortController();
  const abort = (): void => {
    cancel.abort();
  };
  shutdown.addEventListener('abort', abort, { once: true });
  let latest: Change | undefined;
  let writing: Promise<unknown> = Promise.resolve();
  const flush = (): void => {
    const change = latest;
    latest = undefined;
    if (change)
      writing = writing.then(() => write(database, version, job, change)).catch(() => undefined);
  };
  const writer = setInterval(flush, WRITE_EVERY_MS);
  const looker = setInterval(() => {
    database.models.Derivation.findByPk(job.derivationId, {
      attributes: ['cancelRequested', 'round'],
    }).then(
      (row) => {
        if (row?.cancelRequested || row?.round !== job.round) cancel.abort();
      },
      () => undefined,
    );
  }, LOOK_FOR_CANCEL_MS);
  try {
    return await runChild(version.source, limits, cancel.signal, ({ state, stage, fraction }) => {
      const isFirst = latest === undefined;
      latest = { state, stage, progress: Math.min(Math.max(fraction, 0), 1) };
      if (isFirst && fraction === 0) flush();
    });
  } finally {
    clearInterval(writer);
    clearInterval(looker);
    shutdown.removeEventListener('abort', abort);
    await writing;
  }
}
