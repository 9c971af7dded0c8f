/** The arguments of the command line taken apart. */

export const COMMANDS = ['properties', 'evaluate', 'check'] as const;
export type Command = (typeof COMMANDS)[number];

export interface Arguments {
  readonly command: Command;
  /** A path, or `-` for standard input. */
  readonly file: string;
  readonly json: boolean;
  /** What stands behind --at, as written. */
  readonly at: string;
  readonly with: string;
  /** Names behind --quantity; undefined for all. */
  readonly quantities: readonly string[] | undefined;
}

/** A way of calling that cannot be understood, as a sentence. */
export class UsageFault extends Error {
  override name = 'UsageFault';
}

export const USAGE = `Derives every equilibrium property from a partition function.

  npm run --silent massieu -- properties FILE [--json]
  npm run --silent massieu -- evaluate   FILE --at "STATE" [--with "VALUES"] [--quantity NAMES] [--json]
  npm run --silent massieu -- check      FILE [--json]

FILE is a formulation (name.massieu), or - for standard input.

  properties   the derived properties, each with its unit and formula
  evaluate     their values in SI units at one state
  check        faults, claims, and the verification of every property

  --at         the natural variables:   --at "N=6.02214076e23, V=0.0224 [m^3], T=273.15 [K]"
  --with       other values of constants and parameters:   --with "a=4e-49 [J m^3]"
  --quantity   only these, by name:   --quantity p,U,C_p
  --json       plain JSON for programs

A number without a unit is in SI units. The exit status is 0 when all is well, 1 when the
formulation, a claim or the state is at fault, and 2 when the call itself is not understood.
`;

const VALUED = ['--at', '--with', '--quantity'] as const;
type Valued = (typeof VALUED)[number];

/** Reads the arguments behind the name of the program; undefined when help is asked for. */
export function readArguments(words: readonly string[]): Arguments | undefined {
  const plain: string[] = [];
  const options = new Map<Valued, string>();
  let json = false;
  for (let i = 0; i < words.length; i++) {
    const word = words[i] ?? '';
    if (word === '--help' || word === '-h' || word === 'help') return undefined;
    if (word === '--json') {
      json = true;
      continue;
    }
    const name = VALUED.find((option) => word === option || word.startsWith(`${option}=`));
    if (name) {
      const value = word === name ? words[++i] : word.slice(name.length + 1);
      if (value === undefined) throw new UsageFault(`${name} needs a value behind it.`);
      options.set(name, value);
    } else if (word.startsWith('--')) {
      throw new UsageFault(`There is no option ${word}.`);
    } else {
      plain.push(word);
    }
  }
  const [first, file, ...more] = plain;
  if (first === undefined) return undefined;
  const command = COMMANDS.find((known) => known === first);
  if (!command)
    throw new UsageFault(`There is no command ${first}; there are ${COMMANDS.join(', ')}.`);
  if (file === undefined) throw new UsageFault(`${command} needs a file, or - for standard input.`);
  if (more.length > 0) throw new UsageFault(`${command} takes one file, not ${more.length + 1}.`);
  if (command === 'evaluate' && !options.has('--at')) {
    throw new UsageFault('evaluate needs a state: --at "T=300 [K], …".');
  }
  const quantities = options
    .get('--quantity')
    ?.split(',')
    .map((name) => name.trim())
    .filter((name) => name !== '');
  return {
    command,
    file,
    json,
    at: options.get('--at') ?? '',
    with: options.get('--with') ?? '',
    quantities,
  };
}
