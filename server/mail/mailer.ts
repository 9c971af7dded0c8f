/** Sends mail by SMTP. */
import { createTransport } from 'nodemailer';
import type { Config } from '../config.ts';
import { Fault } from '../fault.ts';
import type { Logger } from '../log.ts';

export interface Letter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

export interface Mailer {
  /** Throws `unavailable` where this site sends no mail at all. */
  requireMail(): void;
  /**
   * Takes the letter and sends it in its own time. The answer to a request must not wait for it:
   * how long that takes, or that it fails, would tell who has an account.
   */
  post(letter: Letter): void;
  /** Waits for what is being sent. */
  close(): Promise<void>;
}

const ATTEMPTS = 3;
const PAUSE_MS = 2_000;

export function createMailer(
  config: Pick<Config, 'SMTP_URL' | 'MAIL_FROM'>,
  log: Pick<Logger, 'error'>,
): Mailer {
  const transport = config.SMTP_URL === undefined ? undefined : createTransport(config.SMTP_URL);
  const sending = new Set<Promise<void>>();

  const send = async (letter: Letter): Promise<void> => {
    for (let attempt = 1; ; attempt++) {
      try {
        await transport?.sendMail({ from: config.MAIL_FROM, ...letter });
        return;
      } catch (error) {
        if (attempt === ATTEMPTS) {
          log.error({ err: error, subject: letter.subject }, 'a letter could not be sent');
          return;
        }
        await new Promise((resolve) => setTimeout(resolve, PAUSE_MS * attempt));
      }
    }
  };

  return {
    requireMail() {
      if (transport) return;
      throw new Fault(
        'unavailable',
        'This site sends no mail. Ask the site administrator to set SMTP_URL.',
      );
    },
    post(letter) {
      const sent = send(letter).finally(() => sending.delete(sent));
      sending.add(sent);
    },
    async close() {
      await Promise.all(sending);
      transport?.close();
    },
  };
}
