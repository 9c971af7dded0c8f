/** Signing in by the identity provider, over the whole way there and back. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localPath } from '../../server/routes/identity.ts';
import { createPerson, visit, type Browser } from './support/people.ts';
import { openVouchedSite, type VouchedSite } from './support/provider.ts';
import { openSite } from './support/site.ts';

let vouched: VouchedSite;
beforeAll(async () => {
  vouched = await openVouchedSite();
});
afterAll(() => vouched.close());

/** A path with its question, as the browser asks our server for it. */
const pathOf = (address: string): string => {
  const url = new URL(address);
  return url.pathname + url.search;
};

/** Leaves our pages: where the provider is asked, and with which state. */
async function leave(browser: Browser, next?: string): Promise<URL> {
  const query = next === undefined ? '' : `?next=${encodeURIComponent(next)}`;
  const { headers } = await browser.get(`/auth/github${query}`).expect(302);
  return new URL(headers['location'] ?? '');
}

/** Chooses a person at the provider: the address at which the browser comes back. */
async function choose(asked: URL, login: string): Promise<URL> {
  const page = await fetch(asked);
  expect(page.status).toBe(200);
  const valueOf = (text: string, name: string): string =>
    new RegExp(`name="${name}" value="([^"]*)"`)
      .exec(text)?.[1]
      ?.replace(/&#(\d+);/g, (_, code: string) => String.fromCharCode(Number(code))) ?? '';
  const text = await page.text();
  const answer = await fetch(`${asked.origin}${asked.pathname}`, {
    method: 'POST',
    redirect: 'manual',
    body: new URLSearchParams({
      login,
      redirect_uri: valueOf(text, 'redirect_uri'),
      state: valueOf(text, 'state'),
    }),
  });
  return new URL(answer.headers.get('location') ?? '');
}

/** The whole dance; the path at which the browser ends. */
async function dance(browser: Browser, login: string, next?: string): Promise<string> {
  const back = await choose(await leave(browser, next), login);
  const { headers } = await browser.get(pathOf(back.href)).expect(302);
  return headers['location'] ?? '';
}

const sessionIdOf = (headers: Record<string, unknown>): string =>
  /massieu=([^;]+)/.exec(String(headers['set-cookie']))?.[1] ?? '';

describe('the identity provider', () => {
  it('is asked with our client and a state of its own for each attempt', async () => {
    const browser = await visit(vouched.site);
    const one = await leave(browser);
    const other = await leave(browser);
    expect(one.origin).toBe(vouched.provider);
    expect(one.searchParams.get('client_id')).toBe(vouched.site.config.GITHUB_CLIENT_ID);
    expect(one.searchParams.get('redirect_uri')).toBe(
      `${vouched.site.config.publicUrl}/auth/github/callback`,
    );
    expect(one.searchParams.get('state')?.length).toBeGreaterThan(20);
    expect(other.searchParams.get('state')).not.toBe(one.searchParams.get('state'));
  });

  it('vouches for somebody new, who is made once and known again', async () => {
    const first = await visit(vouched.site);
    expect(await dance(first, 'varnholt', '/models/of?mine=1#here')).toBe('/models/of?mine=1#here');
    const { person } = await first.open();
    expect(person).toMatchObject({ name: 'I. Varnholt', email: 'varnholt@hallowmere.example' });
    const second = await visit(vouched.site);
    expect(await dance(second, 'varnholt')).toBe('/desk');
    expect((await second.open()).person?.id).toBe(person?.id);
    const { Person } = vouched.site.database.models;
    expect(await Person.count({ where: { email: person?.email ?? '' } })).toBe(1);
  });

  it('leads to the account that has confirmed the same address', async () => {
    const person = await createPerson(vouched.site, 'Known By Mail');
    await vouched.site.database.models.Person.update(
      { email: 'oswin@hallowmere.example' },
      { where: { id: person.id } },
    );
    const browser = await visit(vouched.site);
    await dance(browser, 'oswin');
    expect((await browser.open()).person).toMatchObject({ id: person.id, name: 'Known By Mail' });
  });

  it('signs in two browsers of a newcomer at once as one person', async () => {
    const browsers = await Promise.all([visit(vouched.site), visit(vouched.site)]);
    const backs = await Promise.all(
      browsers.map(async (browser) => choose(await leave(browser), 'ostrander')),
    );
    await Promise.all(
      browsers.map((browser, i) => browser.get(pathOf(backs[i]?.href ?? '')).expect(302)),
    );
    const people = await Promise.all(browsers.map((browser) => browser.open()));
    expect(people[0]?.person?.name).toBe('N. Ostrander');
    expect(people[1]?.person?.id).toBe(people[0]?.person?.id);
  });

  it('gives the session a new id and the page a new token', async () => {
    const browser = await visit(vouched.site);
    const before = browser.csrfToken;
    const asked = await browser.get('/auth/github').expect(302);
    const back = await choose(new URL(asked.headers['location'] ?? ''), 'lindqvar');
    const signedIn = await browser.get(pathOf(back.href)).expect(302);
    expect(sessionIdOf(asked.headers)).not.toBe('');
    expect(sessionIdOf(signedIn.headers)).not.toBe('');
    expect(sessionIdOf(signedIn.headers)).not.toBe(sessionIdOf(asked.headers));
    await browser.open();
    expect(browser.csrfToken).not.toBe(before);
  });
});

describe('what comes back from the identity provider', () => {
  const refused = async (browser: Browser, path: string): Promise<void> => {
    const { headers } = await browser.get(path).expect(302);
    expect(headers['location']).toBe('/sign-in?problem=not-confirmed');
    expect((await browser.open()).person).toBeNull();
  };

  it('is refused with a forged state, with none, and with that of another browser', async () => {
    const browser = await visit(vouched.site);
    const forged = await choose(await leave(browser), 'varnholt');
    forged.searchParams.set('state', 'forged');
    await refused(browser, pathOf(forged.href));
    const without = await choose(await leave(browser), 'varnholt');
    without.searchParams.delete('state');
    await refused(browser, pathOf(without.href));
    const stranger = await visit(vouched.site);
    const ofStranger = await choose(await leave(stranger), 'varnholt');
    await leave(browser);
    await refused(browser, pathOf(ofStranger.href));
    await refused(await visit(vouched.site), pathOf(ofStranger.href));
  });

  it('is worth something once', async () => {
    const browser = await visit(vouched.site);
    const back = await choose(await leave(browser), 'varnholt');
    await browser.get(pathOf(back.href)).expect(302);
    const other = await visit(vouched.site);
    await leave(other);
    await refused(other, pathOf(back.href));
  });

  it('is refused with a code that the provider does not know', async () => {
    const browser = await visit(vouched.site);
    const asked = await leave(browser);
    const state = encodeURIComponent(asked.searchParams.get('state') ?? '');
    await refused(browser, `/auth/github/callback?code=invented&state=${state}`);
  });

  it('may be a refusal, after which one is back at the sign-in', async () => {
    const browser = await visit(vouched.site);
    await leave(browser);
    await refused(browser, '/auth/github/callback?error=access_denied&error_description=no');
    await refused(browser, '/auth/github/callback?error=server_error');
  });
});

describe('the place after signing in', () => {
  const FOREIGN = [
    'https://elsewhere.example/desk',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '\\\\elsewhere.example',
    'javascript:alert(1)',
    'desk',
    '/\t/elsewhere.example',
    '/\n//elsewhere.example',
    '/.//elsewhere.example',
    '/a/..//elsewhere.example',
    '/%2e//elsewhere.example',
  ];

  it.each(FOREIGN)('is never elsewhere, as %j would have it', (next) => {
    const place = localPath(next, 'http://127.0.0.1:8460');
    expect(place).toMatch(/^\/(?![/\\])/);
    expect(new URL(place, 'http://127.0.0.1:8460').origin).toBe('http://127.0.0.1:8460');
  });

  it('is the desk where the wished one is foreign, over the whole way', async () => {
    const browser = await visit(vouched.site);
    expect(await dance(browser, 'ketteridge', 'https://elsewhere.example/desk')).toBe('/desk');
    expect(await dance(browser, 'ketteridge', '/.//elsewhere.example')).toBe('/desk');
    expect(await dance(browser, 'ketteridge', '/groups/1?tab=people')).toBe('/groups/1?tab=people');
  });
});

describe('a site without an identity provider', () => {
  it('says so at the sign-in', async () => {
    const site = await openSite();
    try {
      const browser = await visit(site);
      for (const path of ['/auth/github', '/auth/github/callback?code=a&state=b']) {
        const { headers } = await browser.get(path).expect(302);
        expect(headers['location']).toBe('/sign-in?problem=no-provider');
      }
    } finally {
      await site.close();
    }
  });
});

describe('the local stand-in', () => {
  it('sends nobody to another machine, and puts no address into its page as markup', async () => {
    const ask = (redirectUri: string) =>
      fetch(
        `${vouched.provider}/login/oauth/authorize?` +
          new URLSearchParams({
            client_id: vouched.site.config.GITHUB_CLIENT_ID ?? '',
            redirect_uri: redirectUri,
            state: '"><script>',
          }).toString(),
      );
    expect((await ask('https://elsewhere.example/')).status).toBe(400);
    const page = await (await ask('http://127.0.0.1:1/"><script>')).text();
    expect(page).not.toContain('<script>');
  });
});
