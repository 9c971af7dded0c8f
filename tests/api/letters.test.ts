/** Letters on their way by SMTP to the local stand-in for the mail server. */
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createMailServer } from '../../server/fakes/mailServer.ts';
import { confirmationMail } from '../../server/mail/letters.ts';
import { createMailer } from '../../server/mail/mailer.ts';

const server = createMailServer();
let smtpUrl: string;
beforeAll(async () => {
  await new Promise<void>((resolve) => server.smtp.listen(0, '127.0.0.1', resolve));
  const { port } = server.smtp.server.address() as AddressInfo;
  smtpUrl = `smtp://127.0.0.1:${port}`;
});
afterAll(() => new Promise<void>((resolve) => server.smtp.close(() => resolve())));

const MAIL_FROM = 'Massieu <massieu@example.org>';

interface Complaint {
  readonly subject: string;
}

function mailerTo(url: string | undefined) {
  const complaints: Complaint[] = [];
  const log = { error: (complaint: Complaint) => void complaints.push(complaint) };
  const mailer = createMailer({ SMTP_URL: url, MAIL_FROM }, log as never);
  return { mailer, complaints };
}

describe('a letter', () => {
  it('arrives whole, with its link unbroken, before the mailer is closed', async () => {
    const { mailer, complaints } = mailerTo(smtpUrl);
    const link = `http://127.0.0.1:8460/confirm-email?token=${'x'.repeat(43)}`;
    mailer.requireMail();
    mailer.post(confirmationMail({ name: 'Zoë Ångström', email: 'zoe@example.org' }, link));
    await mailer.close();
    expect(complaints).toEqual([]);
    expect(server.letters[0]).toMatchObject({
      to: 'zoe@example.org',
      subject: 'Confirm your address for Massieu',
    });
    expect(server.letters[0]?.text).toContain('Dear Zoë Ångström,');
    expect(server.letters[0]?.text).toContain(`\n${link}\n`);
  });

  it('has one addressee, whatever the name of the person holds', async () => {
    const { mailer } = mailerTo(smtpUrl);
    const name = 'Mallory\r\nBcc: everybody@example.org';
    mailer.post(confirmationMail({ name, email: 'mallory@example.org' }, 'http://127.0.0.1/'));
    await mailer.close();
    expect(server.letters[0]?.to).toBe('mallory@example.org');
    expect(server.letters.some(({ to }) => to.includes('everybody'))).toBe(false);
  });
});

describe('a site without a mail server', () => {
  it('says so before anything is done', () => {
    const { mailer } = mailerTo(undefined);
    expect(() => {
      mailer.requireMail();
    }).toThrow(/sends no mail/);
  });
});
