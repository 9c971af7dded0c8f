/** Passwords and the tokens of mailed links: what is stored of them. */
import { createHash, randomBytes } from 'node:crypto';
import { hash, verify } from '@node-rs/argon2';

/** OWASP's recommendation for Argon2id: 19 MiB, 2 passes, one lane. */
const ARGON = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
  return hash(password, ARGON);
}

let decoy: Promise<string> | undefined;

/**
 * Whether the password is the one of the hash. Where there is no hash the answer is no, and takes
 * as long as for one.
 */
export async function isPassword(
  passwordHash: string | null | undefined,
  password: string,
): Promise<boolean> {
  decoy ??= hashPassword(randomBytes(16).toString('hex'));
  const isRight = await verify(passwordHash ?? (await decoy), password);
  return isRight && typeof passwordHash === 'string';
}

export function newToken(): string {
  return randomBytes(32).toString('base64url');
}

export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
