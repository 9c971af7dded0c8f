/** People: registering, confirming, passwords, and identities that a provider vouches for. */
import { createHash, randomBytes } from 'node:crypto';
import { hash, verify } from '@node-rs/argon2';
import { Op } from 'sequelize';
import type { Registration } from '../../shared/contracts/people.ts';
import type { Database } from '../database.ts';
import { Fault } from '../fault.ts';
import type { Mailer } from '../mail/mailer.ts';
import { confirmationMail, resetMail, someoneRegisteredMail } from '../mail/letters.ts';
import type { PersonRow } from '../models/person.ts';

const CONFIRM_HOURS = 48;
const RESET_HOURS = 1;

/** OWASP's recommendation for Argon2id: 19 MiB, 2 passes, one lane. */
const ARGON = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
  return hash(password, ARGON);
}

/** Verified when nobody has the address, so that the answer takes as long as for somebody. */
let decoy: Promise<string> | undefined;

function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

async function issueToken(
  { models }: Database,
  person: PersonRow,
  purpose: 'confirm' | 'reset',
): Promise<string> {
  const token = randomBytes(32).toString('base64url');
  const hours = purpose === 'confirm' ? CONFIRM_HOURS : RESET_HOURS;
  await models.EmailToken.create({
    tokenHash: hashToken(token),
    personId: person.id,
    purpose,
    expiresAt: new Date(Date.now() + hours * 3_600_000),
  });
  return token;
}

/** Takes a token out of the table: it works once. */
async function redeem(
  { models }: Database,
  token: string,
  purpose: 'confirm' | 'reset',
): Promise<PersonRow> {
  const row = await models.EmailToken.findOne({
    where: { tokenHash: hashToken(token), purpose, expiresAt: { [Op.gt]: new Date() } },
  });
  const person = row && (await models.Person.findByPk(row.personId));
  const taken = row ? await models.EmailToken.destroy({ where: { tokenHash: row.tokenHash } }) : 0;
  if (!person || taken === 0) {
    throw new Fault('expired-link', 'It has been used or is too old. Ask for a new one.');
  }
  return person;
}

/**
 * Registers somebody and sends the link that confirms the address. The answer is the same whether
 * or not the address is known, and an account that exists is left as it is.
 */
export async function register(
  database: Database,
  mailer: Mailer,
  publicUrl: string,
  { name, email, password }: Registration,
): Promise<void> {
  const passwordHash = await hashPassword(password);
  const [person, isNew] = await database.models.Person.findOrCreate({
    where: { email },
    defaults: { name, email, passwordHash },
  });
  if (!isNew && person.emailConfirmedAt) {
    await mailer.send(someoneRegisteredMail(person, publicUrl));
    return;
  }
  // Whoever registered an address first without confirming it has no claim on it.
  if (!isNew) await person.update({ name, passwordHash });
  await mailer.send(
    confirmationMail(
      person,
      `${publicUrl}/confirm-email?token=${await issueToken(database, person, 'confirm')}`,
    ),
  );
}

export async function confirmEmail(database: Database, token: string): Promise<PersonRow> {
  const person = await redeem(database, token, 'confirm');
  return person.update({ emailConfirmedAt: new Date() });
}

export async function requestReset(
  database: Database,
  mailer: Mailer,
  publicUrl: string,
  email: string,
): Promise<void> {
  const person = await database.models.Person.findOne({ where: { email } });
  if (!person) return;
  const token = await issueToken(database, person, 'reset');
  await mailer.send(resetMail(person, `${publicUrl}/new-password?token=${token}`));
}

/** Sets a new password by a mailed link, which also proves the address. */
export async function resetPassword(
  database: Database,
  token: string,
  password: string,
): Promise<PersonRow> {
  const person = await redeem(database, token, 'reset');
  return person.update({
    passwordHash: await hashPassword(password),
    emailConfirmedAt: person.emailConfirmedAt ?? new Date(),
  });
}

/** The person with this address and password. Throws `wrong-credentials` or `email-not-confirmed`. */
export async function authenticate(
  { models }: Database,
  email: string,
  password: string,
): Promise<PersonRow> {
  const person = await models.Person.findOne({ where: { email } });
  decoy ??= hashPassword(randomBytes(16).toString('hex'));
  const isRight = await verify(person?.passwordHash ?? (await decoy), password);
  if (!person?.passwordHash || !isRight) {
    throw new Fault(
      'wrong-credentials',
      'No account has this address with this password. Check both, or ask for a new password.',
    );
  }
  if (!person.emailConfirmedAt) {
    throw new Fault(
      'email-not-confirmed',
      'Open the link in the mail that was sent to this address; register again to get a new one.',
    );
  }
  return person;
}

export interface VouchedIdentity {
  readonly provider: string;
  readonly subject: string;
  readonly name: string;
  /** Addresses that the provider says it has verified, in lower case. */
  readonly verifiedEmails: readonly string[];
}

/**
 * The person behind an identity: known by it, or by an address that both sides have verified, or
 * made new.
 */
export async function personOfIdentity(
  { models, sequelize }: Database,
  { provider, subject, name, verifiedEmails }: VouchedIdentity,
): Promise<PersonRow> {
  return sequelize.transaction(async (transaction) => {
    const known = await models.Identity.findOne({
      where: { provider, subject },
      include: 'person',
      transaction,
    });
    if (known?.person) return known.person;
    const byEmail =
      verifiedEmails.length === 0
        ? null
        : await models.Person.findOne({
            where: { email: [...verifiedEmails], emailConfirmedAt: { [Op.ne]: null } },
            transaction,
          });
    // An address that somebody registered without confirming it is not taken over, nor given away.
    const [email = null] = verifiedEmails;
    const isTaken =
      email !== null &&
      !byEmail &&
      (await models.Person.count({ where: { email }, transaction })) > 0;
    const person =
      byEmail ??
      (await models.Person.create(
        {
          name: name.slice(0, 120) || 'Somebody',
          email: isTaken ? null : email,
          emailConfirmedAt: email === null || isTaken ? null : new Date(),
        },
        { transaction },
      ));
    await models.Identity.create({ provider, subject, personId: person.id }, { transaction });
    return person;
  });
}
