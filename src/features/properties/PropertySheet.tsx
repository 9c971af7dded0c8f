/** The sheet: all properties of a derivation, with the choice of form and the state of its numbers. */
import { useDeferredValue, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import {
  FORMS,
  type Derivation,
  type FormName,
  type Verification,
} from '../../../shared/contracts/derivation.ts';
import { Empty, Formula, Segmented, SmallHeading, Tools } from '../../components/index.ts';
import { CopyButton, PropertyEntry, shownForm } from './PropertyEntry.tsx';
import { readStatePoint, writeStatePoint } from './statePoint.ts';
import { StateTable } from './StateTable.tsx';

interface PropertySheetProps {
  readonly derivation: Derivation;
  readonly verification: Verification | null;
}

export function PropertySheet({ derivation, verification }: PropertySheetProps) {
  const [parameters, setParameters] = useSearchParams();
  const [sought, setSought] = useState('');
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
        <span className="text-ink-2 inline-flex flex-wrap items-baseline gap-x-8">
          valid for
          {derivation.domain.map(({ tex, text }) => (
            <Formula key={text} tex={tex} text={text} />
          ))}
          <Formula
            tex={derivation.variables
              .filter(({ role }) => ['temperature', 'extent', 'number', 'pressure'].includes(role))
              .map(({ tex }) => `${tex} > 0`)
              .join(',\\ ')}
          />
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
        <CopyButton
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
          <div
            className="property-formula text-formula overflow-x-auto"
            tabIndex={0}
            role="region"
            aria-label="ln of the partition function"
          >
            <Formula
              tex={derivation.lnPartitionFunction.tex}
              text={derivation.lnPartitionFunction.text}
            />
          </div>
        </div>
        <aside className="property-margin" aria-label="State of the numbers">
          <StateTable
            variables={derivation.variables}
            state={state}
            onChange={(next) => set('at', writeStatePoint(next))}
          />
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
      <p className="text-note text-ink-3 max-w-text mt-22">
        Formulas and checks say what follows from the formulation, not whether the formulation
        describes a substance. For the design of equipment the design codes and the licensed
        practice that apply where it is used go before any model.
      </p>
    </>
  );
}
