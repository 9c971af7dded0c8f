/**
 * A local stand-in for the identity provider: the four addresses that sign-in asks, answered for the
 * people of the demonstration. It trusts everybody and is only ever started on loopback.
 */
import { randomBytes } from 'node:crypto';
import express, { type Express } from 'express';
import { DEMONSTRATION_PEOPLE, type DemonstrationPerson } from '../seed/people.ts';

interface Settings {
  readonly clientId: string;
  readonly clientSecret: string;
}

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
}

const STYLE = `
  :root { color-scheme: light dark; --paper: #f4f0e6; --sheet: #fffdf7; --ink: #1c2226; --ink3: #646b6d; --hair: #e8e2d3; --ultra: #27468f; }
  @media (prefers-color-scheme: dark) { :root { --paper: #151b1d; --sheet: #1c2426; --ink: #ece8dc; --ink3: #98a09b; --hair: #293335; --ultra: #9ab4f0; } }
  body { margin: 0; background: var(--paper); color: var(--ink); font: 17px/1.5 Georgia, serif; }
  main { max-width: 640px; margin: 8vh auto; padding: 0 16px; }
  h1 { font-size: 26px; font-weight: 500; } p { color: var(--ink3); }
  ul { list-style: none; padding: 0; background: var(--sheet); border: 1px solid var(--hair); }
  li + li { border-top: 1px solid var(--hair); }
  button { all: unset; box-sizing: border-box; width: 100%; padding: 14px 22px; cursor: pointer; }
  button:focus-visible { outline: 2px solid var(--ultra); outline-offset: -2px; }
  button b { display: block; font-weight: 500; color: var(--ultra); } small { color: var(--ink3); font: 13px monospace; }
`;

/** The page on which one chooses who to be. */
function page(redirectUri: string, state: string): string {
  const rows = DEMONSTRATION_PEOPLE.map(
    ({ login, name, describes }) =>
      `<li><button name="login" value="${escaped(login)}"><b>${escaped(name)}</b><small>${escaped(describes)}</small></button></li>`,
  );
  return `<!doctype html><html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width,initial-scale=1"><title>Who are you? – local stand-in</title>
<style>${STYLE}</style></head><body><main><h1>Who are you today?</h1>
<p>This page stands in for the identity provider on this machine. The people are invented.</p>
<form method="post" action="/login/oauth/authorize">
<input type="hidden" name="redirect_uri" value="${escaped(redirectUri)}">
<input type="hidden" name="state" value="${escaped(state)}"><ul>${rows.join('')}</ul></form></main></body></html>`;
}

/** Only back to a program on this machine. */
function isLoopback(address: string): boolean {
  try {
    return ['127.0.0.1', 'localhost', '[::1]'].includes(new URL(address).hostname);
  } catch {
    return false;
  }
}

export function createIdentityProvider({ clientId, clientSecret }: Settings): Express {
  const codes = new Map<string, DemonstrationPerson>();
  const tokens = new Map<string, DemonstrationPerson>();
  const app = express();
  app.disable('x-powered-by');
  app.use(express.urlencoded({ extended: false }), express.json());
  const text = (value: unknown): string => (typeof value === 'string' ? value : '');

  app.get('/login/oauth/authorize', (request, response) => {
    const redirectUri = text(request.query['redirect_uri']);
    if (text(request.query['client_id']) !== clientId || !isLoopback(redirectUri)) {
      response.status(400).type('text').send('Unknown client.');
      return;
    }
    response.type('html').send(page(redirectUri, text(request.query['state'])));
  });

  app.post('/login/oauth/authorize', (request, response) => {
    const body = request.body as Record<string, unknown>;
    const person = DEMONSTRATION_PEOPLE.find(({ login }) => login === text(body['login']));
    const redirectUri = text(body['redirect_uri']);
    if (!person || !isLoopback(redirectUri)) {
      response.status(400).type('text').send('Unknown person.');
      return;
    }
    const code = randomBytes(16).toString('hex');
    codes.set(code, person);
    const back = new URL(redirectUri);
    back.searchParams.set('code', code);
    back.searchParams.set('state', text(body['state']));
    response.redirect(back.href);
  });

  app.post('/login/oauth/access_token', (request, response) => {
    const body = request.body as Record<string, unknown>;
    const code = text(body['code']);
    const person = codes.get(code);
    codes.delete(code);
    if (
      !person ||
      text(body['client_id']) !== clientId ||
      text(body['client_secret']) !== clientSecret
    ) {
      response.json({
        error: 'bad_verification_code',
        error_description: 'The code is not known.',
      });
      return;
    }
    const token = randomBytes(24).toString('hex');
    tokens.set(token, person);
    response.json({ access_token: token, token_type: 'bearer', scope: 'user:email' });
  });

  const personOf = (authorization: string | undefined): DemonstrationPerson | undefined =>
    tokens.get(/^(?:bearer|token) (\w+)$/i.exec(authorization ?? '')?.[1] ?? '');

  app.get('/user', (request, response) => {
    const person = personOf(request.get('authorization'));
    if (!person) {
      response.status(401).json({ message: 'Bad credentials' });
      return;
    }
    response.json({
      id: Number(person.subject),
      login: person.login,
      name: person.name,
      email: null,
    });
  });

  app.get('/user/emails', (request, response) => {
    const person = personOf(request.get('authorization'));
    if (!person) {
      response.status(401).json({ message: 'Bad credentials' });
      return;
    }
    response.json([{ email: person.email, primary: true, verified: true, visibility: null }]);
  });

  return app;
}
