/** What is to be said of each name of a text: for completion and for hovering. */
import { FUNCTIONS, isFunctionName } from '../algebra/functions.ts';
import { toNumber, divide } from '../algebra/rational.ts';
import { naturalConstant } from '../units/constants.ts';
import { formatDimension } from '../units/formatDimension.ts';
import { GREEK_NAMES } from './greek.ts';
import { isBuiltInFunction } from './parseExpression.ts';
import type { StatementTree } from './syntax.ts';
import type { Study } from './study.ts';

export type NameKind =
  | 'variable'
  | 'constant'
  | 'parameter'
  | 'abbreviation'
  | 'order parameter'
  | 'function'
  | 'list'
  | 'species'
  | 'report'
  | 'constant of nature'
  | 'property'
  | 'partition function';

export interface NameFacts {
  readonly name: string;
  readonly kind: NameKind;
  /** Coherent SI unit, or the unit of its declaration; `1` for a number, empty where not known. */
  readonly unit: string;
  /** `exp(x)` for functions, else the name. */
  readonly usage: string;
  readonly description: string;
  /** The value with its unit, where it has one. */
  readonly value: string;
}

const KINDS: Readonly<Partial<Record<StatementTree['kind'], NameKind>>> = {
  constant: 'constant',
  parameter: 'parameter',
  let: 'abbreviation',
  order: 'order parameter',
  list: 'list',
  report: 'report',
  molar: 'report',
  extent: 'variable',
  field: 'variable',
};

/** The facts of a name where it stands in this text; undefined for an unknown one. */
export function describeName(
  name: string,
  { tree, scope, formulation, source }: Study,
): NameFacts | undefined {
  if (isBuiltInFunction(name)) return describeFunction(name);
  const entity = scope.entities.get(name);
  const unit =
    entity?.kind === 'value'
      ? formatDimension(entity.value.d.known)
      : entity?.kind === 'list'
        ? formatDimension(entity.dimension)
        : '';
  for (const statement of tree.statements) {
    if (!('name' in statement) || statement.name?.name !== name) continue;
    if (statement.kind === 'function') continue;
    if (statement.kind === 'let' && statement.parameters) {
      const parameters = statement.parameters.map(({ spelled }) => spelled).join(', ');
      return {
        name,
        kind: 'function',
        unit: '',
        usage: `${name}(${parameters})`,
        description: statement.description,
        value: '',
      };
    }
    const kind = KINDS[statement.kind];
    if (!kind || statement.kind === 'faulty') continue;
    const quantity = formulation?.quantities.find((q) => q.name === name);
    const value = quantity
      ? `${toNumber(divide(quantity.value, quantity.unitFactor))}${quantity.unit === '' ? '' : ` ${quantity.unit}`}`
      : 'value' in statement
        ? source.slice(statement.value.span.start, statement.value.span.end)
        : '';
    const declared = statement.unit?.text ?? unit;
    return { name, kind, unit: declared, usage: name, description: statement.description, value };
  }
  const variable = formulation?.variables.find((v) => v.name === name);
  if (entity?.kind === 'value') {
    const description = variable?.description ?? entity.what;
    return { name, kind: 'variable', unit, usage: name, description, value: '' };
  }
  return describeStanding(name) ?? describeProperty(name, scope);
}

function describeFunction(name: string): NameFacts {
  const usage = isFunctionName(name)
    ? `${name}(${FUNCTIONS[name].parameters.join(', ')})`
    : `${name}(x)`;
  const description = isFunctionName(name) ? FUNCTIONS[name].title : 'square root';
  return { name, kind: 'function', unit: '', usage, description, value: '' };
}

/** Constants of nature, which need no declaration. */
export function describeStanding(name: string): NameFacts | undefined {
  if (name === 'pi') {
    return {
      name,
      kind: 'constant of nature',
      unit: '1',
      usage: name,
      description: "ratio of a circle's circumference to its diameter",
      value: String(Math.PI),
    };
  }
  const facts = naturalConstant(name);
  if (!facts) return undefined;
  const unit = formatDimension(facts.dimension);
  return {
    name,
    kind: 'constant of nature',
    unit,
    usage: name,
    description: facts.description,
    value: `${toNumber(facts.value)} ${unit}`,
  };
}

function describeProperty(name: string, scope: Study['scope']): NameFacts | undefined {
  const property = scope.properties.get(name);
  if (!property) return undefined;
  return {
    name,
    kind: 'property',
    unit: formatDimension(property.dimension),
    usage: name,
    description: property.description,
    value: '',
  };
}

/** `Λ` for `Lambda`, where the name begins with a Greek letter's. */
export function greekSpelling(name: string): string | undefined {
  const [head = '', ...rest] = name.split('_');
  const letter = GREEK_NAMES.get(head);
  return letter === undefined ? undefined : [letter, ...rest].join('_');
}
