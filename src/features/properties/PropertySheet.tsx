/** The sheet: all properties of a derivation, with the choice of form and the state of its numbers. */
import { useDeferredValue, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import {
  FORMS,
  type CheckStatus,
  type Derivation,
  type FormName,
  type Verification,
} from '../../../shared/contracts/derivation.ts';
import {
  DisplayFormula,
  Empty,
  Formula,
  QuietButton,
  ScrollingFormula,
  Segmented,
  SmallHeading,
  Tools,
} from '../../components/index.ts';
import { AbsentProperties } from './AbsentProperties.tsx';
import { CopyButton } from './CopyButton.tsx';
import { DerivativeDialog } from './DerivativeDialog.tsx';
import { OpeningSeal } from './OpeningSeal.tsx';
import { PropertyEntry, shownForm } from './PropertyEntry.tsx';
import { readStatePoint, writeStatePoint } from './statePoint.ts';
import { StateTable } from './StateTable.tsx';

interface PropertySheetProps {
  /** The formulation from which it follows. */
  readonly source: string;
  readonly derivation: Derivation;
  readonly verification: Verification | null;
}

export function PropertySheet({ source, derivation, verification }: PropertySheetProps) {
  const [parameters, setParameters] = useSearchParams();
  const [sought, setSought] = useState('');
  const [isAsking, setIsAsking] = useState(false);
  const wanted = useDeferredValue(sought.trim().toLowerCase());
  const forms = FORMS.filter(
    (form) =>
      form === 'molecular' ||
      derivation.properties.some((property) => property.forms.some((one) => one.form === form)),
  );
  const asked = parameters.get('form');
  const form: FormName = forms.find((one) => one === asked) ?? 'molecular';
  const state = readStatePoint(derivation.variables, parameters.get('at'));
  const set = (name: string, value: string): void => {
    setParameters(
      (before) => {
        before.set(name, value);
        return before;
      },
      { replace: true },
    );
  };
  const shown = derivation.properties.filter(
    ({ name, symbol }) =>
      wanted === '' || name.toLowerCase().includes(wanted) || symbol.toLowerCase() === wanted,
  );
  const allTex = derivation.properties
    .map((property) => {
      const one = shownForm(property, form);
      return `${one.symbolTex} &= ${one.tex} \\\\`;
    })
    .join('\n');

  return (
    <>
      <Tools>
        {forms.length > 1 && (
          <Segmented
            label="Form"
            options={forms.map((value) => ({ value, label: value }))}
            value={form}
            onChange={(value) => set('form', value)}
          />
        )}
        <span className="text-ink-2 inline-flex min-w-0 flex-wrap items-baseline gap-x-8">
          valid for
          <ScrollingFormula tex={domainTex(derivation)} label="domain" />
        </span>
        <span className="flex-1" />
        <input
          type="search"
          aria-label="Find a property by name or symbol"
          placeholder="Find a property"
          value={sought}
          onChange={(event) => setSought(event.target.value)}
          className="border-ink-3 text-ink min-h-28 w-[160px] border-b bg-transparent"
        />
        <QuietButton onClick={() => setIsAsking(true)}>
          Any derivative{' '}
          <Formula
            tex="\left(\frac{\partial X}{\partial Y}\right)_{Z}"
            text="of X by Y at constant Z"
          />
        </QuietButton>
        <CopyButton
          isQuiet
          what={`\\begin{aligned}\n${allTex}\n\\end{aligned}`}
          label="Copy all properties as TeX"
        >
          Copy all as TeX
        </CopyButton>
      </Tools>
      <div className="property property-top">
        <div className="property-sheet">
          <SmallHeading>
            <Formula
              tex={derivation.lnPartitionFunction.symbolTex}
              text="ln of the partition function"
            />
          </SmallHeading>
          <DisplayFormula
            className="property-formula"
            tex={derivation.lnPartitionFunction.tex}
            text={derivation.lnPartitionFunction.text}
            label="ln of the partition function"
          />
          <JumpList properties={shown} />
        </div>
        <aside className="property-margin" aria-label="State of the numbers">
          <StateTable
            variables={derivation.variables}
            state={state}
            onChange={(next) => set('at', writeStatePoint(next))}
          />
          {verification && verification.general.length > 0 && (
            <div className="text-note text-ink-2 mt-22">
              <SmallHeading>The model as a whole</SmallHeading>
              <OpeningSeal status={worst(verification.general)} checks={verification.general} />
            </div>
          )}
        </aside>
      </div>
      {shown.map((property) => (
        <PropertyEntry
          key={property.symbol}
          property={property}
          derivation={derivation}
          verification={verification?.properties.find(({ symbol }) => symbol === property.symbol)}
          form={form}
          state={state}
        />
      ))}
      {shown.length === 0 && <Empty>No property of this model is called “{sought}”.</Empty>}
      {wanted === '' && <AbsentProperties absent={derivation.absent ?? []} />}
      {isAsking && (
        <DerivativeDialog {...{ source, derivation, state }} onClose={() => setIsAsking(false)} />
      )}
      <p className="text-note text-ink-3 max-w-text mt-22">
        Formulas and checks say what follows from the formulation, not whether the formulation
        describes a substance. For the design of equipment the design codes and the licensed
        practice that apply where it is used go before any model.
      </p>
    </>
  );
}

/** `V > N b, T > 0, N > 0`: what the formulation demands, then what the variables are. */
function domainTex({ domain, variables }: Derivation): string {
  const positive = ['extent', 'temperature', 'number', 'pressure'];
  const stated = domain.map(({ tex }) => tex);
  // V > N b says more than V > 0.
  const isBounded = (tex: string): boolean => stated.some((one) => one.startsWith(`${tex} >`));
  const signs = variables
    .filter(({ role, tex }) => positive.includes(role) && !isBounded(tex))
    .sort((a, b) => positive.indexOf(a.role) - positive.indexOf(b.role))
    .map(({ tex }) => `${tex} > 0`);
  return [...stated, ...signs].join(',\\; ');
}

function worst(checks: Verification['general']): CheckStatus {
  const has = (status: CheckStatus): boolean => checks.some((check) => check.status === status);
  return has('failed') ? 'failed' : has('undecided') ? 'undecided' : 'passed';
}

/** The symbols in a line, each leading to its place on the sheet. */
function JumpList({ properties }: { readonly properties: Derivation['properties'] }) {
  return (
    <nav
      aria-label="Properties on this sheet"
      className="border-rule mt-8 flex flex-wrap gap-x-14 border-t border-dotted pt-8"
    >
      {properties.map(({ symbol, symbolTex, name }) => (
        <a
          key={symbol}
          href={`#property-${symbol}`}
          title={name}
          aria-label={name}
          className="inline-flex min-h-28 items-center no-underline hover:underline"
        >
          <Formula tex={symbolTex} text={symbol} />
        </a>
      ))}
    </nav>
  );
}
