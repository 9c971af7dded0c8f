/** The names of one formulation: declared ones, natural variables, constants of nature, properties. */
import * as C from '../algebra/construct.ts';
import { NATURAL_CONSTANTS, naturalConstant } from '../units/constants.ts';
import { closed, PURE } from './dimensionCheck.ts';
import type { Names } from './elaborateExpression.ts';
import type { Findings } from './findings.ts';
import type { NaturalConstant, NaturalVariable } from './formulation.ts';
import { propertyNames, type PropertyName, type Setting } from './properties.ts';
import { NATURAL_NAMES, suggestName, type Entity, type Typed } from './scope.ts';
import { PARTITION_FUNCTIONS, type NameTree } from './syntax.ts';

const positive = { positive: true };

export class FormulationScope implements Names {
  readonly used = new Set<string>();
  readonly entities = new Map<string, Entity>();
  findings: Findings;
  /** True in claims, reports and checks, where properties stand for what they are. */
  allowsProperties = false;
  /** ln of the partition function once it is known. */
  lnValue: Typed | undefined;
  /** False where nothing may be said of foreign variables, since the ensemble is at fault. */
  private readonly isCertain: boolean;
  private readonly setting: Setting;
  private readonly variables: readonly NaturalVariable[];
  private readonly constantsUsed = new Set<string>();
  private propertiesKnown: ReadonlyMap<string, PropertyName> | undefined;

  constructor(
    setting: Setting,
    variables: readonly NaturalVariable[],
    findings: Findings,
    isCertain = true,
  ) {
    this.setting = setting;
    this.variables = variables;
    this.findings = findings;
    this.isCertain = isCertain;
    for (const { name, symbol, dimension } of variables) {
      this.entities.set(name, {
        kind: 'value',
        value: { e: symbol, d: closed(dimension) },
        what: 'a natural variable',
      });
    }
    this.addTotals();
  }

  /** The properties that the setting has, by name. */
  get properties(): ReadonlyMap<string, PropertyName> {
    this.propertiesKnown ??= new Map(propertyNames(this.setting).map((one) => [one.name, one]));
    return this.propertiesKnown;
  }

  /** Total number and mole fractions, where there are several species. */
  private addTotals(): void {
    const { species, ensemble } = this.setting;
    const named = species.filter(({ name }) => name !== '');
    if (named.length === 0 || ensemble === 'grand canonical') return;
    const numbers = named.map(({ name }) => C.symbol(`N_${name}`, positive));
    const total = C.sum(numbers);
    const define = (name: string, e: Typed['e'], what: string): void => {
      if (!this.entities.has(name)) {
        this.entities.set(name, { kind: 'value', value: { e, d: PURE }, what });
      }
    };
    define('N', total, 'the total number of molecules');
    named.forEach(({ name }, i) => {
      const number = numbers[i];
      if (!number) return;
      const fraction = C.abbreviation(`x_${name}`, C.divide(number, total));
      define(`x_${name}`, fraction, 'a mole fraction');
    });
  }

  define(name: string, entity: Entity): void {
    this.entities.set(name, entity);
  }

  meaningOf(name: string): string | undefined {
    const entity = this.entities.get(name);
    if (entity?.kind === 'value') return entity.what;
    if (entity) return 'what it is outside';
    if (name === 'pi') return 'the number pi';
    const constant = naturalConstant(name);
    return constant && `the ${constant.description}`;
  }

  look(name: NameTree): Entity | undefined {
    const entity = this.entities.get(name.name);
    if (entity) {
      this.used.add(name.name);
      return entity;
    }
    const natural = this.constantOfNature(name.name);
    if (natural) return { kind: 'value', value: natural, what: 'a constant of nature' };
    const property = this.properties.get(name.name);
    if (property) {
      if (this.allowsProperties) {
        const open = this.openFraction(name.name);
        if (open) return { kind: 'value', value: { e: open, d: PURE }, what: 'a mole fraction' };
        return {
          kind: 'property',
          symbol: C.symbol(property.name),
          dimension: property.dimension,
        };
      }
      if (this.isCertain) this.refuseForeign(name, property);
      return { kind: 'poisoned' };
    }
    if (!this.isCertain && /^(N|mu|x)_/.test(name.name)) return { kind: 'poisoned' };
    const { hint, repairs } = suggestName(name.name, name.spelled, name.span, this.allNames());
    this.findings.add('unknown-name', name.span, { name: name.spelled, hint }, repairs);
    return undefined;
  }

  /** x_w = N_w/N in an open system, where the numbers are properties. */
  private openFraction(name: string): Typed['e'] | undefined {
    const { species, ensemble } = this.setting;
    if (ensemble !== 'grand canonical' || !name.startsWith('x_')) return undefined;
    const total = C.sum(species.map((one) => C.symbol(`N_${one.name}`)));
    return C.divide(C.symbol(`N_${name.slice(2)}`), total);
  }

  lnFunction(name: NameTree): Typed | undefined {
    const expected = PARTITION_FUNCTIONS[this.setting.ensemble];
    if (name.name === expected && this.lnValue) return this.lnValue;
    if (name.name !== expected || !this.allowsProperties) {
      const hint = this.allowsProperties ? `Write ln ${expected}.` : '';
      this.findings.add('unknown-name', name.span, { name: name.spelled, hint });
    }
    return undefined;
  }

  /** hbar and R are written by h and N_Av k, so that they cancel against them. */
  private constantOfNature(name: string): Typed | undefined {
    if (name === 'pi') return { e: C.pi, d: PURE };
    const facts = naturalConstant(name);
    if (!facts) return undefined;
    const d = closed(facts.dimension);
    const use = (of: string): Typed['e'] => {
      this.constantsUsed.add(of);
      return C.symbol(of, positive);
    };
    if (name === 'hbar') {
      return { e: C.abbreviation('hbar', C.divide(use('h'), C.product([C.two, C.pi]))), d };
    }
    if (name === 'R') return { e: C.abbreviation('R', C.multiply(use('N_Av'), use('k'))), d };
    return { e: use(name), d };
  }

  private refuseForeign(name: NameTree, property: PropertyName): void {
    const { ensemble } = this.setting;
    this.findings.add('foreign-variable', name.span, {
      name: name.spelled,
      ensemble,
      function: PARTITION_FUNCTIONS[ensemble],
      variables: this.variables.map((variable) => variable.name).join(', '),
      hint: `${name.spelled} is the ${property.description}; declare the name if you mean a quantity of your own.`,
    });
  }

  /** Every name that could stand here. */
  allNames(): string[] {
    return [
      ...this.entities.keys(),
      ...NATURAL_NAMES,
      ...(this.allowsProperties ? this.properties.keys() : []),
    ];
  }

  /** The constants of nature that have been looked up; k always, for the properties. */
  naturalConstants(): NaturalConstant[] {
    return NATURAL_CONSTANTS.filter(({ name }) => this.constantsUsed.has(name) || name === 'k').map(
      ({ name, dimension, value, uncertainty, description }) => ({
        name,
        symbol: C.symbol(name, positive),
        dimension,
        value,
        ...(uncertainty ? { uncertainty } : {}),
        description,
      }),
    );
  }
}
