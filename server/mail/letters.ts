/** The letters that Massieu writes, as plain text. */
import type { Letter } from './mailer.ts';

interface Addressee {
  readonly name: string;
  readonly email: string | null;
}

function letter(person: Addressee, subject: string, lines: readonly string[]): Letter {
  return {
    to: person.email ?? '',
    subject,
    text: [`Dear ${person.name},`, '', ...lines, '', 'Massieu'].join('\n'),
  };
}

export function confirmationMail(person: Addressee, link: string): Letter {
  return letter(person, 'Confirm your address for Massieu', [
    'open this link to confirm your address. It works once, within two days:',
    '',
    link,
    '',
    'If you did not register, do nothing; the account is not used without it.',
  ]);
}

export function resetMail(person: Addressee, link: string): Letter {
  return letter(person, 'A new password for Massieu', [
    'open this link to choose a new password. It works once, within an hour:',
    '',
    link,
    '',
    'If you did not ask for it, do nothing; your password stays as it is.',
  ]);
}

export function someoneRegisteredMail(person: Addressee, publicUrl: string): Letter {
  return letter(person, 'You have an account at Massieu already', [
    'somebody, probably you, registered with this address, which has an account already.',
    `Sign in at ${publicUrl}/sign-in, or ask there for a new password.`,
  ]);
}
