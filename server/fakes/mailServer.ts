/** A local stand-in for the mail server: keeps letters in memory and shows them on a page. */
import express, { type Express } from 'express';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export interface KeptLetter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly at: Date;
}

const MOST_LETTERS = 200;

export interface MailServer {
  readonly smtp: SMTPServer;
  readonly page: Express;
  readonly letters: readonly KeptLetter[];
}

export function createMailServer(): MailServer {
  const letters: KeptLetter[] = [];
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    logger: false,
    onData(stream, _session, done) {
      simpleParser(stream).then(
        (mail) => {
          const to = Array.isArray(mail.to) ? mail.to : mail.to ? [mail.to] : [];
          letters.unshift({
            to: to.map(({ text }) => text).join(', '),
            subject: mail.subject ?? '',
            text: mail.text ?? '',
            at: new Date(),
          });
          letters.splice(MOST_LETTERS);
          done();
        },
        (error: unknown) => {
          done(error as Error);
        },
      );
    },
  });
  const page = express();
  page.disable('x-powered-by');
  page.get('/mail', (_request, response) => {
    response.json(letters);
  });
  page.get('/', (_request, response) => {
    const shown = letters.map(
      ({ to, subject, at, text }) => `${at.toISOString()}  to ${to}\n${subject}\n\n${text}`,
    );
    response
      .type('text/plain')
      .send(shown.join(`\n${'-'.repeat(72)}\n`) || 'No letter has been sent yet.');
  });
  return { smtp, page, letters };
}
