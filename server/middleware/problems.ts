/** The one place where an error becomes an answer: RFC 9457 problem details. */
import type { ErrorRequestHandler, RequestHandler } from 'express';
import { ZodError } from 'zod';
import { Fault } from '../fault.ts';

export const nothingHere: RequestHandler = (_request, _response, next) => {
  next(new Fault('not-found', 'There is no such address in the API.'));
};

/** Faults by field, the first of each, for a form to show beside the field. */
function fieldsOf(error: ZodError): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const { path, message } of error.issues) {
    const name = path.join('.') || 'request';
    fields[name] ??= message;
  }
  return fields;
}

function asFault(error: unknown): Fault {
  if (error instanceof Fault) return error;
  if (error instanceof ZodError) {
    const fields = fieldsOf(error);
    const [first] = Object.values(fields);
    return new Fault('validation', first ?? 'A field is not as it should be.', { fields });
  }
  const status = (error as { status?: unknown }).status;
  if (status === 413) return new Fault('payload-too-large', 'Send at most 512 KiB at once.');
  // A body, or an address, that cannot be read at all.
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new Fault('validation', 'The request cannot be read. Send JSON in UTF-8.');
  }
  return new Fault(
    'internal',
    'The fault is ours and has been recorded. Try again; if it stays, tell the site administrator the request id.',
  );
}

export const problems: ErrorRequestHandler = (error: unknown, request, response, next) => {
  if (response.headersSent) {
    next(error);
    return;
  }
  const fault = asFault(error);
  const problem = fault.toProblem();
  if (problem.status >= 500) request.log.error({ err: error }, 'request failed');
  const instance = `urn:massieu:request:${String(response.getHeader('x-request-id'))}`;
  response
    .status(problem.status)
    .type('application/problem+json')
    .send(JSON.stringify({ ...problem, instance }));
};
