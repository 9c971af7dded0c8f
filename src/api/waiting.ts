/** What waits for a person on the desk. */
import type { Desk } from '../../shared/contracts/models.ts';

type Job = Desk['jobs'][number];

/** Derivations that failed: somebody must look. */
export function failedJobs(desk: Desk): Job[] {
  return desk.jobs.filter(({ version }) => version.derivation.state === 'failed');
}

/** Derivations that run or wait for their turn. */
export function runningJobs(desk: Desk): Job[] {
  return desk.jobs.filter(({ version }) =>
    ['queued', 'deriving', 'verifying'].includes(version.derivation.state),
  );
}

/** The number beside Desk in the running head. */
export function countWaiting(desk: Desk): number {
  return failedJobs(desk).length + runningJobs(desk).length;
}
