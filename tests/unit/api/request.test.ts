import { afterEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { isProblem } from '../../../src/api/problem.ts';
import { command, request } from '../../../src/api/request.ts';

const session = (csrfToken: string) => ({
  person: null,
  csrfToken,
  groups: [],
  identityProviderIsLocal: true,
});

function answer(body: unknown, status = 200): Response {
  return new Response(JSON.stringify(body), { status });
}

/** Answers in turn; keeps what was asked. */
function stage(...answers: (Response | Error)[]) {
  const asked: { path: string; method: string; token: string | null }[] = [];
  vi.stubGlobal('fetch', (path: string, options: RequestInit) => {
    const headers = new Headers(options.headers);
    asked.push({ path, method: options.method ?? 'GET', token: headers.get('X-CSRF-Token') });
    const next = answers.shift();
    return next instanceof Response
      ? Promise.resolve(next)
      : Promise.reject(next ?? new Error('one request too many'));
  });
  return asked;
}

afterEach(() => vi.unstubAllGlobals());

describe('a request', () => {
  it('brings the token with every change, and a fresh one where the server refuses it', async () => {
    const asked = stage(
      answer(session('first')),
      answer({ type: 'urn:massieu:problem:csrf', title: 't', status: 403, detail: 'd' }, 403),
      answer(session('second')),
      answer({}),
    );
    await command('/api/models/1', { method: 'PATCH', body: { title: 'x' } });
    expect(asked.map(({ method, token }) => `${method} ${token}`)).toEqual([
      'GET null',
      'PATCH first',
      'GET null',
      'PATCH second',
    ]);
  });

  it('throws the problem that the server names, with its fields', async () => {
    stage(
      answer(
        {
          type: 'urn:massieu:problem:validation',
          title: 'Not valid',
          status: 422,
          detail: 'Mend the title.',
          fields: { title: 'Write a title.' },
        },
        422,
      ),
    );
    const fault: unknown = await request(z.unknown(), '/api/x').catch((thrown: unknown) => thrown);
    expect(isProblem(fault, 'validation') && fault.fields).toEqual({ title: 'Write a title.' });
  });

  it('says that the server cannot be reached, or gave an answer of another make', async () => {
    stage(new TypeError('failed to fetch'), new Response('<html>', { status: 502 }));
    for (let turn = 0; turn < 2; turn++) {
      const fault: unknown = await request(z.unknown(), '/api/x').catch(
        (thrown: unknown) => thrown,
      );
      expect(isProblem(fault, 'unavailable')).toBe(true);
    }
  });
});
