/** What a text declares: the ensemble and its variables, and every name with its statement. */
import { symbol } from '../algebra/construct.ts';
import { naturalConstant } from '../units/constants.ts';
import { DIMENSIONLESS } from '../units/dimension.ts';
import { parseUnit } from '../units/parseUnit.ts';
import type { Findings } from './findings.ts';
import type { Ensemble, NaturalVariable, Species } from './formulation.ts';
import { naturalVariables, USUAL_EXTENTS } from './naturalVariables.ts';
import { isBuiltInFunction } from './parseExpression.ts';
import type { Setting } from './properties.ts';
import {
  PARTITION_FUNCTIONS,
  type NameTree,
  type SourceTree,
  type Statement,
  type StatementTree,
} from './syntax.ts';

export interface Declarations extends Setting {
  /** False where the ensemble is only guessed, after a fault. */
  readonly isEnsembleKnown: boolean;
  readonly variables: readonly NaturalVariable[];
  /** First statement of each name that the author gave. */
  readonly named: ReadonlyMap<string, StatementTree>;
  /** Statements of `kind`, without those that repeat a name. */
  readonly of: <K extends StatementTree['kind']>(kind: K) => readonly Statement<K>[];
}

type Span = NameTree['span'];

/** Reads the declarations off the tree and reports what is stated twice or under a taken name. */
export function collectDeclarations(tree: SourceTree, findings: Findings): Declarations {
  const statements = tree.statements;
  const ofKind = <K extends StatementTree['kind']>(kind: K): Statement<K>[] =>
    statements.filter((statement): statement is Statement<K> => statement.kind === kind);
  const wasFaulty = (word: string): boolean =>
    statements.some((statement) => statement.kind === 'faulty' && statement.word === word);

  const once = <K extends StatementTree['kind']>(
    kind: K,
    what: string,
  ): Statement<K> | undefined => {
    const [first, second] = ofKind(kind);
    if (second) {
      if (kind === 'ensemble') findings.add('two-ensembles', second.span);
      else findings.add('twice-stated', second.span, { what });
    }
    return first;
  };

  const stated = once('ensemble', 'The ensemble');
  const isUnread = statements.length === 0 && findings.errorCount > 0;
  if (!stated && !wasFaulty('ensemble') && !isUnread) {
    const guess = guessedEnsemble(statements);
    findings.add('no-ensemble', { start: 0, end: 0 }, {}, [
      {
        title: `write ensemble ${guess}`,
        edits: [{ span: afterTitle(findings.source), text: `ensemble ${guess}\n` }],
      },
    ]);
  }
  const ensemble = stated?.ensemble ?? guessedEnsemble(statements);
  once('factorials', 'factorials exact');
  const extentStatement = once('extent', 'The extent');
  const speciesStatement = once('species', 'The list of species');
  const isEnsembleKnown =
    stated !== undefined && !wasFaulty('extent') && !wasFaulty('species') && !wasFaulty('field');

  const species: Species[] = (speciesStatement?.list ?? []).map(({ name, description }) => ({
    name: name.name,
    description,
  }));
  if (species.length === 0) species.push({ name: '', description: '' });
  const extentName = extentStatement?.name.name ?? 'V';
  const extentUnit = extentStatement?.unit && parseUnit(extentStatement.unit.text).unit;
  const extent = {
    name: extentName,
    dimension: extentUnit?.dimension ?? USUAL_EXTENTS[extentName] ?? DIMENSIONLESS,
  };
  const fields: NaturalVariable[] = ofKind('field').map((field) => ({
    role: 'field',
    name: field.name.name,
    symbol: symbol(field.name.name),
    dimension: (field.unit && parseUnit(field.unit.text).unit?.dimension) ?? DIMENSIONLESS,
    description: field.description,
    response: field.response.name,
  }));
  const setting: Setting = { ensemble, extent, species, fields };
  const description = extentStatement?.description ?? '';
  const variables = naturalVariables(
    setting,
    description === '' && extentName === 'V' ? 'volume' : description,
  );

  const named = new Map<string, StatementTree>();
  const repeated = new Set<StatementTree>();
  const places = new Map<string, Span>();
  const taken = new Map(
    variables
      .filter(({ role }) => role !== 'field' && role !== 'extent')
      .map(({ name, description: words }) => [name, words]),
  );
  if (!extentStatement) taken.set('V', 'volume');
  const declare = (name: NameTree, statement: StatementTree): void => {
    const first = places.get(name.name);
    if (first) {
      findings.add('double-definition', name.span, {
        name: name.spelled,
        where: findings.lineWords(first),
      });
      repeated.add(statement);
      return;
    }
    places.set(name.name, name.span);
    const what = taken.get(name.name);
    if (what !== undefined && isEnsembleKnown && variables.some((v) => v.name === name.name)) {
      findings.add('double-definition', name.span, {
        name: name.spelled,
        where: `as the ${what}, a natural variable of the ensemble`,
      });
      repeated.add(statement);
      return;
    }
    if (refusesName(name, PARTITION_FUNCTIONS[ensemble], findings)) repeated.add(statement);
    named.set(name.name, statement);
  };
  for (const statement of statements) {
    if (statement.kind === 'field') declare(statement.response, statement);
    if (statement.kind === 'function') {
      if (statement.name.name === 'q') declare(statement.name, statement);
    } else if (statement.kind === 'faulty') {
      if (statement.name && !named.has(statement.name.name)) {
        named.set(statement.name.name, statement);
      }
    } else if ('name' in statement) {
      declare(statement.name, statement);
    }
  }
  checkSpecies(speciesStatement, findings);
  return {
    ...setting,
    isEnsembleKnown,
    variables,
    named,
    of: (kind) => ofKind(kind).filter((statement) => !repeated.has(statement)),
  };
}

/** A place behind a comment on the first line. */
function afterTitle(source: string): Span {
  const end = source.startsWith('#') ? source.indexOf('\n') + 1 : 0;
  return { start: end, end };
}

/** After a fault, the ensemble whose function the text states. */
function guessedEnsemble(statements: readonly StatementTree[]): Ensemble {
  const ensembles = Object.keys(PARTITION_FUNCTIONS) as Ensemble[];
  const names = statements.flatMap((s) => (s.kind === 'function' ? [s.name.name] : []));
  return ensembles.find((e) => names.includes(PARTITION_FUNCTIONS[e])) ?? 'canonical';
}

/** True where a quantity cannot have this name at all. */
function refusesName(name: NameTree, functionName: string, findings: Findings): boolean {
  const { span, spelled } = name;
  if (isBuiltInFunction(name.name) || name.name === 'log') {
    findings.add('reserved-name', span, { name: spelled, what: 'a function of the language' });
    return true;
  }
  if (name.name === functionName) {
    findings.add('reserved-name', span, { name: spelled, what: 'the partition function' });
    return true;
  }
  const constant = naturalConstant(name.name);
  if (name.name === 'pi' || (constant && !constant.isReplaceable)) {
    findings.add('fixed-name', span, {
      name: spelled,
      what: constant ? `the ${constant.description}` : "the ratio of a circle's circumference",
    });
    return true;
  }
  if (constant) {
    findings.add('constant-replaced', span, { name: spelled, what: constant.description });
  }
  return false;
}

function checkSpecies(statement: Statement<'species'> | undefined, findings: Findings): void {
  const seen = new Map<string, Span>();
  for (const { name } of statement?.list ?? []) {
    const first = seen.get(name.name);
    if (first) {
      findings.add('double-definition', name.span, {
        name: name.spelled,
        where: findings.lineWords(first),
      });
    }
    seen.set(name.name, name.span);
  }
}
