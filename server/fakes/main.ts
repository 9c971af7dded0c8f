/** Starts the local stand-ins for the identity provider and the mail server, on loopback. */
import process from 'node:process';
import { z } from 'zod';
import { createIdentityProvider } from './identityProvider.ts';
import { createMailServer } from './mailServer.ts';

const port = z.coerce.number().int().min(1).max(65_535);
const { FAKE_IDENTITY_PORT, FAKE_MAIL_PORT, GITHUB_CLIENT_ID, GITHUB_CLIENT_SECRET } = z
  .object({
    FAKE_IDENTITY_PORT: port,
    FAKE_MAIL_PORT: port,
    GITHUB_CLIENT_ID: z.string().default(''),
    GITHUB_CLIENT_SECRET: z.string().default(''),
  })
  .parse(process.env);

const LOOPBACK = '127.0.0.1';

const mail = createMailServer();
const provider = createIdentityProvider({
  clientId: GITHUB_CLIENT_ID,
  clientSecret: GITHUB_CLIENT_SECRET,
});
// Letters are read where one signs in.
provider.use('/letters', mail.page);
const server = provider.listen(FAKE_IDENTITY_PORT, LOOPBACK);
mail.smtp.listen(FAKE_MAIL_PORT, LOOPBACK);
console.log(`identity provider on ${FAKE_IDENTITY_PORT}, mail on ${FAKE_MAIL_PORT}`);

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => {
    server.closeAllConnections();
    server.close();
    mail.smtp.close(() => process.exit(0));
  });
}
