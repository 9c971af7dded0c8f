/** The one way to the API: JSON both ways, the CSRF token with every change, typed faults. */
import type { z } from 'zod';
import { sessionSchema } from '../../shared/contracts/people.ts';
import { isProblem, readProblem, unreachable } from './problem.ts';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

export interface RequestOptions {
  readonly method?: Method;
  /** Sent as JSON. */
  readonly body?: unknown;
  readonly signal?: AbortSignal;
}

let csrfToken: string | undefined;

/** Remembers the token that the session brought. */
export function rememberCsrfToken(token: string): void {
  csrfToken = token;
}

async function send(path: string, { method = 'GET', body, signal }: RequestOptions) {
  const headers: Record<string, string> = { Accept: 'application/json, application/problem+json' };
  if (body !== undefined) headers['Content-Type'] = 'application/json';
  if (method !== 'GET') headers['X-CSRF-Token'] = csrfToken ?? (await fetchCsrfToken());
  const response = await fetch(path, {
    method,
    headers,
    credentials: 'same-origin',
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    ...(signal ? { signal } : {}),
  }).catch((fault: unknown) => {
    if (signal?.aborted) throw fault;
    throw unreachable();
  });
  if (!response.ok) throw await readProblem(response);
  return response;
}

async function fetchCsrfToken(): Promise<string> {
  const session = await request(sessionSchema, '/api/session');
  csrfToken = session.csrfToken;
  return csrfToken;
}

async function sendOnceMore(path: string, options: RequestOptions): Promise<Response> {
  try {
    return await send(path, options);
  } catch (fault) {
    // The token belongs to a session that has ended meanwhile: one attempt with a fresh one.
    if (!isProblem(fault, 'csrf')) throw fault;
    csrfToken = undefined;
    return send(path, options);
  }
}

/**
 * Sends a request and reads its answer by the schema. Throws a ProblemError for every fault that
 * the server names and where the server cannot be reached.
 */
export async function request<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  options: RequestOptions = {},
): Promise<z.output<Schema>> {
  const response = await sendOnceMore(path, options);
  return schema.parse(await response.json());
}

/** Sends a request of whose answer only the success matters. */
export async function command(path: string, options: RequestOptions): Promise<void> {
  await sendOnceMore(path, options);
}

/** Like `command`, but goes on where the page is being left; for the last save of a draft. */
export function commandWhileLeaving(path: string, method: Method, body: unknown): void {
  void fetch(path, {
    method,
    keepalive: true,
    credentials: 'same-origin',
    headers: { 'Content-Type': 'application/json', 'X-CSRF-Token': csrfToken ?? '' },
    body: JSON.stringify(body),
  }).catch(() => undefined);
}
