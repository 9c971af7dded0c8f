/**
 * Who runs in this checkout: `.massieu/running.json` holds the process, the time of its start (a
 * number may be given to another process later) and its address. The file is put in place by a
 * hard link, which fails when there is one already, so that of two starts only one goes on.
 */
import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ownFolder, readJson, STATE } from './folder.mjs';
import { isAlive } from './process.mjs';

const PLACE = join(STATE, 'running.json');

/** The fields of /proc/PID/stat behind the name; empty when there is no such process. */
function statusOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ');
  } catch {
    return [];
  }
}

/** The process that started another, as text; undefined when that one is gone. */
export function parentOf(pid) {
  return statusOf(pid)[1];
}

/** Start of a process in clock ticks since boot; undefined when there is no such process. */
function startTime(pid) {
  return statusOf(pid)[19];
}

function isRunning({ pid, startTime: since }) {
  return Number.isInteger(pid) && isAlive(pid) && startTime(pid) === since;
}

function place(content) {
  const own = `${PLACE}.${process.pid}`;
  writeFileSync(own, JSON.stringify(content), { mode: 0o600 });
  try {
    linkSync(own, PLACE);
    return true;
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw error;
  } finally {
    rmSync(own, { force: true });
  }
}

/**
 * Who runs in this checkout now.
 *
 * @returns {{ pid: number, url: string } | null}
 */
export function whoRuns() {
  const other = readJson(PLACE);
  return isRunning(other) ? other : null;
}

/**
 * Claim the checkout.
 *
 * @param {string} url the address at which this start will answer
 * @returns {{ pid: number, url: string } | null} who runs here already, or null when it is ours
 */
export function claim(url) {
  ownFolder(STATE, 0o711);
  const own = { pid: process.pid, startTime: startTime(process.pid), url };
  for (;;) {
    if (place(own)) return null;
    const other = readJson(PLACE);
    if (isRunning(other)) return other;
    // Stale: take it away by a rename, which only one of several starts can do. Should it be
    // another start's fresh claim by now, that one is put back.
    const aside = `${PLACE}.stale.${process.pid}`;
    try {
      renameSync(PLACE, aside);
    } catch {
      continue;
    }
    const taken = readJson(aside);
    if (isRunning(taken)) linkSync(aside, PLACE);
    rmSync(aside, { force: true });
  }
}

/** Give the checkout free again, if it is ours. */
export function release() {
  if (readJson(PLACE).pid === process.pid) rmSync(PLACE, { force: true });
}
