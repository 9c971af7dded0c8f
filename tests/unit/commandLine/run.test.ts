import { describe, expect, it } from 'vitest';
import { readArguments } from '../../../shared/thermodynamics/commandLine/arguments.ts';
import { run } from '../../../shared/thermodynamics/commandLine/run.ts';

const FLUID = `# Hard-core fluid with mean-field attraction
ensemble canonical
constant  m [u]     = 39.948                            "molecular mass"
parameter a [J m^3] = 3.7e-49 between 0 and 1e-47       "attraction"
parameter b [m^3]   = 5.3e-29 between 1e-30 and 1e-27   "excluded volume per molecule"
let Lambda = h / sqrt(2 pi m k T)
q = (V - N b) / Lambda^3 * exp(a N / (V k T))
Q = q^N / N!
claim "internal pressure" partial(U, V; T, N) = a N^2 / V^2
`;

async function call(words: string, source = FLUID) {
  const args = readArguments(words.split(' ').map((word) => word.replaceAll('~', ' ')));
  if (!args) throw new Error('help');
  return run(args, source);
}

interface Printed {
  readonly diagnostics: readonly object[];
  readonly properties: readonly { symbol: string }[];
  readonly values: readonly { symbol: string; value: number; unit: string }[];
  readonly claims: readonly { status: string }[];
  readonly verification: { status: string };
}

const json = ({ output }: { output: string }) => JSON.parse(output) as Printed;

describe('massieu properties', () => {
  it('lists every property with unit and formula as JSON', async () => {
    const outcome = await call('properties f --json');
    expect(outcome.status).toBe(0);
    const { properties, diagnostics } = json(outcome);
    expect(diagnostics).toEqual([]);
    expect(properties[0]).toEqual({
      symbol: 'p',
      name: 'pressure',
      unit: 'Pa',
      text: 'N k T/(V - N b) - a N^2/V^2',
      tex: '\\frac{N k T}{V - N b} - \\frac{a N^{2}}{V^{2}}',
    });
    const symbols = properties.map(({ symbol }) => symbol);
    for (const wanted of 'p U S A G H mu C_V C_p kappa_T alpha gamma mu_JT w Z'.split(' ')) {
      expect(symbols).toContain(wanted);
    }
  });

  it('prints a table and the domain for people', async () => {
    const { output } = await call('properties f');
    expect(output).toMatch(/^p +Pa +pressure +N k T\/\(V - N b\) - a N\^2\/V\^2$/m);
    expect(output).toContain('valid for V > N b');
  });

  it('names every fault with place, code and way out, and leaves with 1', async () => {
    const outcome = await call('properties f --json', 'ensemble canonical\nln Q = N ln(V)\n');
    expect(outcome.status).toBe(1);
    expect(json(outcome).diagnostics).toEqual([
      expect.objectContaining({ code: 'dimension', severity: 'error', line: 2 }),
    ]);
    expect(Object.keys(json(outcome).diagnostics[0] ?? {}).sort()).toEqual(
      ['code', 'column', 'hint', 'line', 'message', 'severity'].sort(),
    );
  });
});

describe('massieu evaluate', () => {
  it('gives values in SI units at a state', async () => {
    const outcome = await call(
      'evaluate f --at N=6.02214076e23,V=22.4~[L],T=273.15~[K] --quantity p,C_V --json',
    );
    expect(outcome.status).toBe(0);
    const { values } = json(outcome);
    expect(values.map(({ symbol, unit }) => [symbol, unit])).toEqual([
      ['p', 'Pa'],
      ['C_V', 'J/K'],
    ]);
    expect(values[1]?.value).toBeCloseTo(12.4716939, 6);
  });

  it('takes other values of parameters', async () => {
    const at = 'evaluate f --at N=1e23,V=0.01,T=300 --quantity Z --json';
    const { values } = json(await call(`${at} --with a=0,b=1e-30~[m^3]`));
    expect(values[0]?.value).toBeCloseTo(1.00001, 6);
  });

  it('says which variable is missing, and leaves with 1', async () => {
    const outcome = await call('evaluate f --at N=1e23 --json');
    expect(outcome.status).toBe(1);
    expect(json(outcome).values).toEqual([]);
    expect(outcome.output).toContain('The state lacks V.');
  });

  it('refuses a unit of another dimension', async () => {
    const outcome = await call('evaluate f --at N=1e23,V=1~[K],T=300');
    expect(outcome.status).toBe(1);
    expect(outcome.output).toContain('V is a volume');
  });
});

describe('massieu check', { timeout: 60_000 }, () => {
  it('reports claims and verification', async () => {
    const outcome = await call('check f --json');
    expect(outcome.status).toBe(0);
    const { claims, verification } = json(outcome);
    expect(claims.map(({ status }) => status)).toEqual(['passed']);
    expect(verification.status).toBe('passed');
  });

  it('leaves with 1 and the line of a claim that does not hold', async () => {
    const outcome = await call('check f --json', `${FLUID}claim "wrong" U = N k T\n`);
    expect(outcome.status).toBe(1);
    expect(json(outcome).diagnostics).toEqual([
      expect.objectContaining({ code: 'claim-failed', line: 10 }),
    ]);
  });
});
