/** Programs of Debian that are needed and missing, installed by apt-get. */
import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { Fault } from './fault.mjs';
import { run } from './process.mjs';
import { say, step } from './say.mjs';

/** The path of a program, or undefined. */
export function which(program) {
  const folders = (process.env.PATH ?? '').split(':').concat('/usr/sbin', '/usr/bin', '/sbin');
  return folders.map((folder) => `${folder}/${program}`).find((path) => existsSync(path));
}

/** Whether installing will ask for a password, so that nothing else should write meanwhile. */
export function asksForPassword() {
  return privilege()?.foreground === true;
}

/** How to run a command as root: directly, by sudo, or not at all. */
function privilege() {
  if (process.getuid?.() === 0) return { prefix: [], foreground: false };
  if (which('sudo') === undefined) return null;
  try {
    execFileSync('sudo', ['-n', 'true'], { stdio: 'ignore' });
    return { prefix: ['sudo', '-n'], foreground: false };
  } catch {
    return process.stdin.isTTY ? { prefix: ['sudo'], foreground: true } : null;
  }
}

/**
 * Install Debian packages.
 *
 * @param {readonly string[]} packages
 * @param {string} instead what else would serve, for the sentence that explains a failure
 */
export async function installDebian(packages, instead) {
  const list = packages.join(' ');
  const byHand = `Install by hand with: apt-get install --no-install-recommends ${list}\n${instead}`;
  if (which('apt-get') === undefined) {
    throw new Fault(`${list} is missing, and there is no apt-get here to install it with.`, byHand);
  }
  const means = privilege();
  if (means === null) {
    throw new Fault(
      `${list} is missing, and installing it needs root or sudo, neither of which works here.`,
      byHand,
    );
  }
  const aptGet = (parameters, progress) => {
    const [program, ...rest] = [
      ...means.prefix,
      'env',
      'DEBIAN_FRONTEND=noninteractive',
      'apt-get',
      '-o',
      'DPkg::Lock::Timeout=180',
      ...parameters,
    ];
    return run(program, rest, {
      foreground: means.foreground,
      letFinish: true,
      stdio: [means.foreground ? 'inherit' : 'ignore', 'pipe', 'pipe'],
      onLine: (line) => progress(line.slice(0, 60)),
      fails: (tail) =>
        new Fault(`apt-get could not install ${list}.`, `It said:\n${tail}\n${byHand}`),
    });
  };
  if (means.foreground) say(`  Installing ${list} needs root: sudo may ask for your password.`);
  await step(`Installing ${list} from Debian`, async (progress) => {
    await aptGet(['update'], progress);
    await aptGet(['install', '-y', '--no-install-recommends', ...packages], progress);
  });
}
