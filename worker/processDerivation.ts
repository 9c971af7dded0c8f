/** One job of the queue: read the version, let a child derive it, write what came of it. */
import { createHash } from 'node:crypto';
import type { Database } from '../server/database.ts';
import type { Logger } from '../server/log.ts';
import type { DerivationRow } from '../server/models/derivation.ts';
import type { VersionRow } from '../server/models/version.ts';
import type { DerivationJob } from '../server/queue/derivationQueue.ts';
import { unsuccessful } from '../server/services/derivations.ts';
import { ENGINE, type Outcome } from './derivation.ts';
import { runChild, type Ending, type Limits } from './runChild.ts';
import { writeFailure, writeProgress, type Change } from './writeProgress.ts';

/** Progress is written at most this often; a change of stage waits for its turn. */
const WRITE_EVERY_MS = 150;
const LOOK_FOR_CANCEL_MS = 250;

/** A formulation that takes its worker down each time is not tried for ever. */
const MOST_ATTEMPTS = 20;

/** The worker ends before the job is done; the job is for another one. */
export class WorkerEnds extends Error {
  override name = 'WorkerEnds';
}

/**
 * Does the job; doing it again is harmless. Throws WorkerEnds when `shutdown` is aborted, and
 * another error where trying again may help, which is left to the queue.
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
  if (derivation.attempts >= MOST_ATTEMPTS) {
    await writeFailure(database, version, job, 'The worker ended each time it derived this.');
    return;
  }
  const begun = await writeProgress(database, version, job, ({ attempts }) => ({
    state: 'deriving',
    progress: 0,
    stage: 'reading the formulation',
    attempts: attempts + 1,
  }));
  if (!begun) return;

  const ending = await watch(database, version, job, limits, shutdown);
  if (shutdown.aborted && ending.kind !== 'outcome') {
    throw new WorkerEnds('the worker is ending; another one takes the job');
  }
  switch (ending.kind) {
    case 'outcome':
      if (!(await writeOutcome(database, version, job, ending.outcome))) {
        log.error({ versionId: version.id }, 'deriving again gave another result');
      }
      return;
    case 'fault':
      await writeFailure(database, version, job, ending.message);
      return;
    case 'cancelled':
      await writeProgress(
        database,
        version,
        job,
        (row) => unsuccessful(row, 'cancelled', null),
        'derivation-cancelled',
      );
      return;
    case 'died':
      throw new Error(ending.message);
  }
}

/** Writes the outcome; false where it differs from the one that stands. */
async function writeOutcome(
  database: Database,
  version: VersionRow,
  job: DerivationJob,
  outcome: Outcome,
): Promise<boolean> {
  const { result, verification } = outcome;
  const resultHash = createHash('sha256').update(`${result}\n${verification}`).digest('hex');
  let isAsBefore = true;
  const change = (standing: DerivationRow): Change => {
    if (standing.resultHash === null) {
      return {
        ...outcome,
        resultHash,
        engine: ENGINE,
        state: 'complete',
        progress: 1,
        stage: 'complete',
      };
    }
    isAsBefore = standing.resultHash === resultHash;
    return isAsBefore
      ? { state: 'complete', progress: 1, stage: 'complete; derived again, byte for byte the same' }
      : unsuccessful(
          standing,
          'failed',
          standing.engine === ENGINE
            ? 'Deriving again gave other bytes. The version keeps its first result; tell the site administrator.'
            : 'This release of Massieu derives otherwise than the one that derived the version. The version keeps its first result.',
        );
  };
  await writeProgress(database, version, job, change, 'derivation-complete');
  return isAsBefore;
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
  await writeFailure(
    database,
    derivation.version,
    job,
    `The derivation was tried several times and ended each time: ${reason}. Try again; if it stays, tell the site administrator.`,
  );
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
  if (shutdown.aborted) abort();
  let latest: Change | undefined;
  let writing: Promise<unknown> = Promise.resolve();
  const flush = (): void => {
    const change = latest;
    latest = undefined;
    if (!change) return;
    writing = writing
      .then(() => writeProgress(database, version, job, change))
      .catch(() => undefined);
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
      latest = { state, stage, progress: Math.min(Math.max(fraction, 0), 1) };
    });
  } finally {
    clearInterval(writer);
    clearInterval(looker);
    shutdown.removeEventListener('abort', abort);
    await writing;
  }
}
