/** What the command line does with a source: a text to print and an exit status. */
import type { ClaimResult, Verification } from '../../contracts/derivation.ts';
import type { Diagnostic } from '../../language/diagnostic.ts';
import { derive } from '../derive.ts';
import { evaluate } from '../evaluate.ts';
import type { Arguments } from './arguments.ts';
import { readAssignments } from './assignments.ts';
import { alignOnPoint, figure, table } from './table.ts';

export interface Outcome {
  readonly output: string;
  readonly status: 0 | 1;
}

/** Runs one command on a source text. */
export async function run(args: Arguments, source: string): Promise<Outcome> {
  switch (args.command) {
    case 'properties':
      return properties(args, source);
    case 'evaluate':
      return evaluateAt(args, source);
    case 'check':
      return check(args, source);
  }
}

type Shown = Pick<Diagnostic, 'code' | 'severity' | 'line' | 'column' | 'message' | 'hint'>;

function shown({ code, severity, line, column, message, hint }: Diagnostic): Shown {
  return { code, severity, line, column, message, hint };
}

function isFault(diagnostics: readonly Shown[]): boolean {
  return diagnostics.some(({ severity }) => severity === 'error');
}

function outcome(
  { json, file }: Arguments,
  diagnostics: readonly Shown[],
  rest: object,
  words: readonly string[],
): Outcome {
  const status = isFault(diagnostics) ? 1 : 0;
  const output = json
    ? `${JSON.stringify({ diagnostics, ...rest }, undefined, 2)}\n`
    : `${[diagnosticWords(diagnostics, file), ...words].filter((part) => part !== '').join('\n\n')}\n`;
  return { output, status };
}

function diagnosticWords(diagnostics: readonly Shown[], file: string): string {
  return diagnostics
    .map(({ severity, line, column, message, hint, code }) => {
      const place = line > 0 ? `${file}:${line}:${column}: ` : '';
      return [`${place}${severity}: ${message} (${code})`, ...(hint === '' ? [] : [`  ${hint}`])];
    })
    .flat()
    .join('\n');
}

function properties(args: Arguments, source: string): Outcome {
  const { diagnostics, derivation } = derive(source);
  const list = (derivation?.properties ?? []).map(({ symbol, name, unit, text, tex }) => ({
    symbol,
    name,
    unit,
    text,
    tex,
  }));
  const domain = derivation?.domain.map(({ text }) => text).join(', ') ?? '';
  const rows = list.map(({ symbol, unit, name, text }) => [symbol, unit, name, text]);
  return outcome(
    args,
    diagnostics.map(shown),
    { properties: list, claims: derivation?.claims ?? [] },
    [table(rows), domain === '' ? '' : `valid for ${domain}`],
  );
}

async function evaluateAt(args: Arguments, source: string): Promise<Outcome> {
  const { diagnostics, model } = derive(source, { properties: [] });
  const list: Shown[] = diagnostics.map(shown);
  if (!model) return outcome(args, list, { values: [] }, []);
  const { quantities, variables } = model.formulation;
  const state = readAssignments(args.at, variables);
  const overrides = readAssignments(args.with, quantities);
  for (const message of [...state.faults, ...overrides.faults]) {
    list.push({ code: 'state', severity: 'error', line: 0, column: 0, message, hint: '' });
  }
  if (isFault(list)) return outcome(args, list, { values: [] }, []);
  // Loaded where it is needed only: the library of many digits takes longer than most derivations.
  const { preciseValue } = await import('../verification/preciseValue.ts');
  const result = evaluate(model, state.values, overrides.values, args.quantities, preciseValue);
  list.push(...result.diagnostics.map(shown));
  const figures = alignOnPoint(result.values.map(({ value }) => figure(value)));
  const rows = result.values.map(({ symbol, unit }, i) => [symbol, figures[i] ?? '', unit]);
  return outcome(args, list, { values: result.values }, [table(rows)]);
}

async function check(args: Arguments, source: string): Promise<Outcome> {
  const { diagnostics, derivation, model } = derive(source);
  const list: Shown[] = diagnostics.map(shown);
  if (!derivation || !model) {
    return outcome(args, list, { claims: [], verification: null }, []);
  }
  const { verify } = await import('../verification/index.ts');
  const verification = verify(model);
  for (const { title, status, detail, line } of derivation.claims) {
    if (status !== 'failed') continue;
    list.push({
      code: 'claim-failed',
      severity: 'error',
      line,
      column: 1,
      message: `The claim “${title}” does not hold.`,
      hint: detail,
    });
  }
  return outcome(args, list, { claims: derivation.claims, verification }, [
    claimWords(derivation.claims),
    verificationWords(verification),
  ]);
}

function claimWords(claims: readonly ClaimResult[]): string {
  if (claims.length === 0) return '';
  const rows = claims.map(({ title, status, method, detail }) => [title, status, method, detail]);
  return `Claims\n${table(rows)}`;
}

function verificationWords({ properties: list, general, status }: Verification): string {
  const rows = list.map((property) => {
    const passed = property.checks.filter((c) => c.status === 'passed').length;
    const open = property.checks.filter((c) => c.status !== 'passed');
    return [
      property.symbol,
      property.status,
      `${passed} of ${property.checks.length}`,
      open.map((c) => `${c.title}: ${c.status}. ${c.detail}`).join(' '),
    ];
  });
  const whole = general.map((c) => [c.title, c.status, c.detail]);
  return [`Verification: ${status}`, table(rows), table(whole)]
    .filter((t) => t !== '')
    .join('\n\n');
}
