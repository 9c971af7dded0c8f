/** Registering with e-mail and password: an account comes to be when its mailed link is opened. */
import { Op, UniqueConstraintError } from 'sequelize';
import type { Registration } from '../../shared/contracts/people.ts';
import type { Database } from '../database.ts';
import { Fault } from '../fault.ts';
import { confirmationMail, someoneRegisteredMail } from '../mail/letters.ts';
import type { Letter } from '../mail/mailer.ts';
import { hashPassword, hashToken, newToken } from './passwords.ts';

const CONFIRM_HOURS = 48;

/**
 * Keeps the registration until its link is opened; the result is the letter to be sent. An account
 * that has the address already is left as it is, and its owner is told.
 */
export async function register(
  { models }: Database,
  publicUrl: string,
  { name, email, password }: Registration,
): Promise<Letter> {
  const passwordHash = await hashPassword(password);
  const person = await models.Person.findOne({ where: { email } });
  if (person) return someoneRegisteredMail(person, publicUrl);
  const token = newToken();
  await models.Registration.destroy({ where: { expiresAt: { [Op.lt]: new Date() } } });
  await models.Registration.create({
    tokenHash: hashToken(token),
    email,
    name,
    passwordHash,
    expiresAt: new Date(Date.now() + CONFIRM_HOURS * 3_600_000),
  });
  return confirmationMail({ name, email }, `${publicUrl}/confirm-email?token=${token}`);
}

/** Makes the account that the link belongs to. Throws `expired-link` for one used or too old. */
export async function confirmEmail({ models, sequelize }: Database, token: string): Promise<void> {
  const expired = new Fault('expired-link', 'It has been used or is too old. Register once more.');
  try {
    await sequelize.transaction(async (transaction) => {
      const registration = await models.Registration.findOne({
        where: { tokenHash: hashToken(token), expiresAt: { [Op.gt]: new Date() } },
        lock: transaction.LOCK.UPDATE,
        transaction,
      });
      if (!registration) throw expired;
      const { name, email, passwordHash } = registration;
      await models.Person.create(
        { name, email, passwordHash, emailConfirmedAt: new Date() },
        { transaction },
      );
      // The other links for this address lead nowhere any more.
      await models.Registration.destroy({ where: { email }, transaction });
    });
  } catch (error) {
    if (error instanceof UniqueConstraintError) throw expired;
    throw error;
  }
}
