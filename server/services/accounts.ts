/** People: passwords, and identities that a provider vouches for. */
import { Op, UniqueConstraintError } from 'sequelize';
import type { Database } from '../database.ts';
import { Fault } from '../fault.ts';
import { resetMail } from '../mail/letters.ts';
import type { Letter } from '../mail/mailer.ts';
import type { PersonRow } from '../models/person.ts';
import { hashPassword, hashToken, isPassword, newToken } from './passwords.ts';

const RESET_HOURS = 1;

/** The letter with a link for a new password; undefined where nobody has the address. */
export async function requestReset(
  { models }: Database,
  publicUrl: string,
  email: string,
): Promise<Letter | undefined> {
  const person = await models.Person.findOne({ where: { email } });
  if (!person) return undefined;
  const token = newToken();
  await models.EmailToken.create({
    tokenHash: hashToken(token),
    personId: person.id,
    purpose: 'reset',
    expiresAt: new Date(Date.now() + RESET_HOURS * 3_600_000),
  });
  return resetMail(person, `${publicUrl}/new-password?token=${token}`);
}

/**
 * Sets a new password by a mailed link, and ends all sessions of the person: one of them may be
 * that of somebody who knew the old password. Throws `expired-link` for a link used or too old.
 */
export async function resetPassword(
  { models, sequelize }: Database,
  token: string,
  password: string,
): Promise<void> {
  const passwordHash = await hashPassword(password);
  await sequelize.transaction(async (transaction) => {
    const row = await models.EmailToken.findOne({
      where: {
        tokenHash: hashToken(token),
        purpose: 'reset',
        expiresAt: { [Op.gt]: new Date() },
      },
      lock: transaction.LOCK.UPDATE,
      transaction,
    });
    if (!row) {
      throw new Fault('expired-link', 'It has been used or is too old. Ask for a new one.');
    }
    const { personId } = row;
    await models.EmailToken.destroy({ where: { personId }, transaction });
    await models.Person.update({ passwordHash }, { where: { id: personId }, transaction });
    await sequelize.query(`DELETE FROM sessions WHERE sess->'passport'->>'user' = :personId`, {
      replacements: { personId },
      transaction,
    });
  });
}

/** The person with this address and password. Throws `wrong-credentials` or `email-not-confirmed`. */
export async function authenticate(
  { models }: Database,
  email: string,
  password: string,
): Promise<PersonRow> {
  const person = await models.Person.findOne({ where: { email } });
  const registration = person
    ? null
    : await models.Registration.findOne({ where: { email }, order: [['createdAt', 'DESC']] });
  const isRight = await isPassword((person ?? registration)?.passwordHash, password);
  if (person && isRight) return person;
  if (registration && isRight) {
    throw new Fault(
      'email-not-confirmed',
      'Open the link in the mail that was sent to this address; register again to get a new one.',
    );
  }
  throw new Fault(
    'wrong-credentials',
    'No account has this address with this password. Check both, or ask for a new password.',
  );
}

export interface VouchedIdentity {
  readonly provider: string;
  readonly subject: string;
  readonly name: string;
  /** Addresses that the provider says it has verified, in lower case; the primary one first. */
  readonly verifiedEmails: readonly string[];
}

/**
 * The person behind an identity: known by it, or by an address that both sides have verified, or
 * made new.
 */
export async function personOfIdentity(
  database: Database,
  identity: VouchedIdentity,
): Promise<PersonRow> {
  const known = await knownPerson(database, identity);
  if (known) return known;
  try {
    return await newIdentity(database, identity);
  } catch (error) {
    // The same person came twice at once, and the other one was first.
    const other =
      error instanceof UniqueConstraintError ? await knownPerson(database, identity) : undefined;
    if (other) return other;
    throw error;
  }
}

async function knownPerson(
  { models }: Database,
  { provider, subject }: VouchedIdentity,
): Promise<PersonRow | undefined> {
  const known = await models.Identity.findOne({ where: { provider, subject }, include: 'person' });
  return known?.person;
}

async function newIdentity(
  { models, sequelize }: Database,
  { provider, subject, name, verifiedEmails }: VouchedIdentity,
): Promise<PersonRow> {
  return sequelize.transaction(async (transaction) => {
    const [email = null] = verifiedEmails;
    // Every account has confirmed its address: registrations that have not are none yet.
    const person =
      (email === null
        ? null
        : await models.Person.findOne({ where: { email: [...verifiedEmails] }, transaction })) ??
      (await models.Person.create(
        {
          name: name.slice(0, 120) || 'Somebody',
          email,
          emailConfirmedAt: email === null ? null : new Date(),
        },
        { transaction },
      ));
    await models.Identity.create({ provider, subject, personId: person.id }, { transaction });
    return person;
  });
}
