/**
 * Where the services keep their data: `.massieu/` in the checkout, or, when the unprivileged user
 * cannot reach that (a parent folder is closed, as with a checkout under root's home), a folder
 * under /var/tmp named after the checkout's path, so that every start finds the same one.
 */
import { execFileSync } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import {
  chmodSync,
  chownSync,
  existsSync,
  mkdirSync,
  openSync,
  readFileSync,
  renameSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Fault } from './fault.mjs';

const LOG_LIMIT_BYTES = 10 * 1024 * 1024;

/** The checkout. */
export const ROOT = resolve(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** Git-ignored: secrets, ports, logs, and the services' data where they can live here. */
export const STATE = join(ROOT, '.massieu');

/** Whether the user may enter the folder; always true of ourselves. */
function canEnter(folder, user) {
  if (user === null) return true;
  try {
    execFileSync(
      'setpriv',
      [`--reuid=${user.uid}`, `--regid=${user.gid}`, '--clear-groups', '--', 'test', '-x', folder],
      { stdio: 'ignore', cwd: '/' },
    );
    return true;
  } catch {
    return false;
  }
}

/** A folder of our own with the given mode; refuses one that belongs to somebody else. */
export function ownFolder(path, mode) {
  mkdirSync(path, { recursive: true, mode });
  const uid = process.getuid?.() ?? 0;
  const owner = statSync(path).uid;
  if (owner !== uid) {
    throw new Fault(
      `The folder ${path} belongs to another user (number ${owner}).`,
      'Start as that user, or remove the folder; what it holds is then lost.',
    );
  }
  chmodSync(path, mode);
  return path;
}

/** The folder in which the data folders of the services lie, reachable for each of `users`. */
export function servicesFolder(users) {
  ownFolder(STATE, 0o711);
  if (users.every((user) => canEnter(STATE, user))) return STATE;
  const name = createHash('sha256').update(ROOT).digest('hex').slice(0, 12);
  return ownFolder(join('/var/tmp', `massieu-${name}`), 0o711);
}

/** A folder that belongs to the user of a service and is closed to everybody else. */
export function folderOf(path, user) {
  mkdirSync(path, { recursive: true, mode: 0o700 });
  if (user !== null) chownSync(path, user.uid, user.gid);
  chmodSync(path, 0o700);
  return path;
}

/** Write a file that only its user may read. */
export function writeSecretFile(path, text, user = null) {
  writeFileSync(path, text, { mode: 0o600 });
  chmodSync(path, 0o600);
  if (user !== null) chownSync(path, user.uid, user.gid);
}

/** A log file opened for appending; one that has grown long is put aside as `.1`. */
export function openLog(path) {
  if (existsSync(path) && statSync(path).size > LOG_LIMIT_BYTES) renameSync(path, `${path}.1`);
  return openSync(path, 'a', 0o600);
}

export function randomSecret() {
  return randomBytes(24).toString('base64url');
}

/** A small JSON file; an absent or a broken one reads as empty. */
export function readJson(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'));
  } catch {
    return {};
  }
}

/**
 * The secrets that belong to what lies in a folder, made at the first start and kept there.
 *
 * @param {readonly string[]} names
 * @param {string} [folder]
 * @returns {Record<string, string>}
 */
export function secrets(names, folder = STATE) {
  ownFolder(folder, 0o711);
  const path = join(folder, 'secrets.json');
  const known = existsSync(path) ? readJson(path) : {};
  const missing = names.filter((name) => typeof known[name] !== 'string');
  for (const name of missing) known[name] = randomSecret();
  if (missing.length > 0) writeSecretFile(path, `${JSON.stringify(known, null, 2)}\n`);
  return known;
}
