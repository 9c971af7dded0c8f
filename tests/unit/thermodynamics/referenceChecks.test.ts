/** The values of tests/reference/checks.json, each with its source, as far as the language goes. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readAssignments } from '../../../shared/thermodynamics/commandLine/assignments.ts';
import { derive, evaluate } from '../../../shared/thermodynamics/index.ts';

interface Check {
  readonly id: string;
  readonly title: string;
  readonly formulation: string;
  readonly ask: Readonly<Record<string, unknown>>;
  readonly expect?: Readonly<Record<string, unknown>>;
  readonly rtol?: number;
  readonly basis: string;
  readonly source: string;
}

const checks = JSON.parse(
  readFileSync(new URL('../../reference/checks.json', import.meta.url), 'utf8'),
) as Check[];

/** Kinds of questions that the product does not answer yet. */
const PENDING_KINDS: Readonly<Record<string, string>> = {
  critical: 'critical points',
  boyle: 'Boyle curves',
  inversion: 'inversion curves',
  virial: 'virial coefficients',
  coexistence: 'coexistence curves',
  binodal: 'binodal curves',
  maximum: 'extrema of properties',
  transition: 'transitions of order parameters',
};

/** Questions that need what is not derived yet, by the name of the check. */
const PENDING_NAMES: Readonly<Record<string, string>> = {
  'mean-field-ising-0.3': 'order parameters',
  'mean-field-ising-0.5': 'order parameters',
  'mean-field-ising-0.8': 'order parameters',
  'mean-field-ising-0.99': 'order parameters',
  'regular-solution-gamma': 'activity coefficients',
};

/** What the checks call a fault, and its code. */
const CODES: Readonly<Record<string, string>> = {
  dimension: 'dimension',
  'unknown name': 'unknown-name',
  'circular definition': 'circular-definition',
  'double definition': 'double-definition',
  'ambiguous division': 'ambiguous-division',
  'no partition function': 'no-partition-function',
  'two partition functions': 'two-partition-functions',
  'foreign variable': 'foreign-variable',
  'order parameter not used': 'order-parameter-not-used',
  'log is ambiguous': 'log-is-ambiguous',
  'divergent sum': 'divergent-sum',
  'divergent integral': 'divergent-integral',
  'not extensive': 'not-extensive',
  'start outside bounds': 'start-outside-bounds',
  'unused name': 'unused-name',
};

function pendingReason({ id, ask }: Check): string | undefined {
  const kind = Object.keys(ask).find((name) => PENDING_KINDS[name] !== undefined);
  return PENDING_NAMES[id] ?? (kind ? PENDING_KINDS[kind] : undefined);
}

describe('values from outside', () => {
  for (const check of checks) {
    const title = `${check.id}: ${check.title} (${check.source})`;
    const pending = pendingReason(check);
    if (pending) it.todo(`${title} [pending: ${pending}]`);
    else it(title, { timeout: 60_000 }, () => run(check));
  }
});

it('every name in the list of pending checks is one of a check', () => {
  const ids = checks.map(({ id }) => id);
  expect(Object.keys(PENDING_NAMES).filter((name) => !ids.includes(name))).toEqual([]);
});

function run(check: Check): void {
  const { ask } = check;
  if (typeof ask['evaluate'] === 'string') evaluateAt(check, ask['evaluate'], ask['then']);
  else if (typeof ask['identity'] === 'string') holds(check, ask['identity']);
  else if (typeof ask['refuse'] === 'string') complains(check, ask['refuse'], 'error');
  else if (typeof ask['warn'] === 'string') complains(check, ask['warn'], 'warning');
  else throw new Error(`A check of an unknown kind: ${JSON.stringify(ask)}`);
}

function evaluateAt(check: Check, at: string, then: unknown): void {
  const extra = typeof then === 'string' ? `\nreport asked = ${then}` : '';
  const { model, diagnostics } = derive(check.formulation + extra);
  expect(diagnostics.filter(({ severity }) => severity === 'error')).toEqual([]);
  if (!model) throw new Error('no model');
  const { values: state, faults } = readAssignments(at, model.formulation.variables);
  expect(faults).toEqual([]);
  for (const [name, expected] of Object.entries(check.expect ?? {})) {
    const quantity = extra === '' ? name : 'asked';
    const result = evaluate(model, state, {}, [quantity]);
    expect(result.diagnostics).toEqual([]);
    const value = result.values[0]?.value ?? NaN;
    const difference = Math.abs(value - Number(expected)) / Math.abs(Number(expected));
    expect(difference, `${name} is ${value}, not ${String(expected)}`).toBeLessThanOrEqual(
      check.rtol ?? 0,
    );
  }
}

function holds(check: Check, identity: string): void {
  const { derivation, diagnostics } = derive(
    `${check.formulation}\nclaim "as published" ${identity}`,
    { properties: [] },
  );
  expect(diagnostics.filter(({ severity }) => severity === 'error')).toEqual([]);
  expect(derivation?.claims.at(-1)).toMatchObject({ status: 'passed', method: 'symbolically' });
}

function complains(check: Check, fault: string, severity: 'error' | 'warning'): void {
  const { diagnostics } = derive(check.formulation);
  const code = CODES[fault];
  const found = diagnostics.filter((d) => d.severity === severity);
  expect(found.map((d) => d.code)).toContain(code);
  for (const { message, line } of found) {
    expect(message).not.toBe('');
    expect(line).toBeGreaterThan(0);
  }
}
