/** The local stand-in for the identity provider on a port of its own, and a site that asks it. */
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { createIdentityProvider } from '../../../server/fakes/identityProvider.ts';
import { openSite, type Site } from './site.ts';

const CLIENT = { clientId: 'massieu-under-test', clientSecret: 'known to both sides' };

export interface VouchedSite {
  readonly site: Site;
  /** Where the stand-in answers, `http://127.0.0.1:PORT`. */
  readonly provider: string;
  close(): Promise<void>;
}

/** Opens both; `settings` are added to the environment of the site. */
export async function openVouchedSite(
  settings: Readonly<Record<string, string>> = {},
): Promise<VouchedSite> {
  const server = createServer(createIdentityProvider(CLIENT));
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const provider = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const site = await openSite({
    GITHUB_CLIENT_ID: CLIENT.clientId,
    GITHUB_CLIENT_SECRET: CLIENT.clientSecret,
    GITHUB_AUTHORIZATION_URL: `${provider}/login/oauth/authorize`,
    GITHUB_TOKEN_URL: `${provider}/login/oauth/access_token`,
    GITHUB_USER_URL: `${provider}/user`,
    GITHUB_EMAILS_URL: `${provider}/user/emails`,
    IDENTITY_PROVIDER_IS_LOCAL: 'true',
    ...settings,
  });
  return {
    site,
    provider,
    async close() {
      await site.close();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}
