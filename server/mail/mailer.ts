/** Sends mail by SMTP. */
import { createTransport } from 'nodemailer';
import type { Config } from '../config.ts';
import { Fault } from '../fault.ts';

export interface Letter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

export interface Mailer {
  /** Throws `unavailable` where the mail server does not take the letter. */
  send(letter: Letter): Promise<void>;
  close(): void;
}

export function createMailer(config: Pick<Config, 'SMTP_URL' | 'MAIL_FROM'>): Mailer {
  const transport = config.SMTP_URL === undefined ? undefined : createTransport(config.SMTP_URL);
  return {
    async send(letter) {
      if (!transport) {
        throw new Fault(
          'unavailable',
          'This site sends no mail. Ask the site administrator to set SMTP_URL.',
        );
      }
      try {
        await transport.sendMail({ from: config.MAIL_FROM, ...letter });
      } catch (cause) {
        throw new Fault(
          'unavailable',
          'The mail could not be sent. Try again in some minutes; nothing else was lost.',
          { cause: String((cause as Error).name) },
        );
      }
    },
    close: () => transport?.close(),
  };
}
