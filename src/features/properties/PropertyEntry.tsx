/** One property: symbol, name and unit; formula; contributions; derivation; seal and notes beside. */
import type {
  Derivation,
  DerivedProperty,
  FormName,
  PropertyVerification,
} from '../../../shared/contracts/derivation.ts';
import {
  DisplayFormula,
  Formula,
  Note,
  ScrollingFormula,
  writtenUnit,
} from '../../components/index.ts';
import { Contributions } from './Contributions.tsx';
import { CopyButton } from './CopyButton.tsx';
import { OpeningSeal } from './OpeningSeal.tsx';
import { valueAt, writtenValue, type StatePoint } from './statePoint.ts';

interface PropertyEntryProps {
  readonly property: DerivedProperty;
  readonly derivation: Derivation;
  readonly verification: PropertyVerification | undefined;
  readonly form: FormName;
  readonly state: StatePoint;
}

export function PropertyEntry({
  property,
  derivation,
  verification,
  form,
  state,
}: PropertyEntryProps) {
  const shown = shownForm(property, form);
  const value = valueAt(property.tree, derivation, state);
  return (
    <section
      className="property"
      id={`property-${property.symbol}`}
      aria-label={property.name}
      tabIndex={-1}
    >
      <div className="property-sheet">
        <div className="flex items-baseline gap-12">
          <span className="text-ink min-w-34">
            <Formula tex={property.symbolTex} text={property.symbol} />
          </span>
          <h2 className="text-body">{property.name}</h2>
          <span className="text-label text-ink-3 ml-auto font-mono">{writtenUnit(shown.unit)}</span>
        </div>
        <DisplayFormula
          className="property-formula"
          tex={`${shown.symbolTex} = ${shown.tex}`}
          text={`${property.symbol} = ${shown.text}`}
          label={property.name}
        />
        <p className="text-label text-ink-3 flex flex-wrap items-baseline gap-x-14 font-mono">
          <span>
            {value === undefined
              ? 'no value at this state'
              : `${writtenValue(value)} ${property.unit === '1' ? '' : writtenUnit(property.unit)}`}
          </span>
          <span className="ml-auto flex gap-8">
            <CopyButton
              what={`${shown.symbolTex} = ${shown.tex}`}
              label={`Copy ${property.name} as TeX`}
            >
              TeX
            </CopyButton>
            <CopyButton
              what={`${property.symbol} = ${shown.text}`}
              label={`Copy ${property.name} as text`}
            >
              text
            </CopyButton>
          </span>
        </p>
        {form === 'molecular' && property.contributions.length > 1 && (
          <Contributions property={property} derivation={derivation} state={state} />
        )}
        {property.steps.length > 0 && (
          <details className="border-rule mt-10 border-t border-dotted pt-8">
            <summary className="text-label text-ultramarine font-mono">
              Derivation, {property.steps.length} {property.steps.length === 1 ? 'step' : 'steps'}
            </summary>
            <ol className="mt-10">
              {property.steps.map((step, index) => (
                <li key={index} className="derivation-step text-ink-3 py-6">
                  <span aria-hidden="true">{index + 1}.</span>
                  <span className="text-label font-mono">{step.rule}</span>
                  <ScrollingFormula
                    className="text-ink"
                    tex={step.tex}
                    label={`step ${index + 1}`}
                  />
                </li>
              ))}
            </ol>
          </details>
        )}
      </div>
      <aside className="property-margin text-note text-ink-2" aria-label={`On ${property.name}`}>
        {verification && <OpeningSeal {...verification} />}
        {property.notes.map((note) => (
          <Note key={note.text + note.tex} tone={note.kind === 'diverges' ? 'ochre' : 'plain'}>
            <b className={note.kind === 'diverges' ? 'text-ochre' : 'text-ink'}>
              {note.kind === 'diverges' ? 'Diverges' : 'Assumes'}
            </b>{' '}
            {note.kind === 'diverges' ? (
              <>
                where <ScrollingFormula tex={note.tex} text={note.text} label="where it diverges" />
              </>
            ) : (
              note.text
            )}
          </Note>
        ))}
      </aside>
    </section>
  );
}

interface ShownForm {
  readonly symbolTex: string;
  readonly tex: string;
  readonly text: string;
  readonly unit: string;
}

/** The form asked for; the molecular one where a property has no other. */
export function shownForm(property: DerivedProperty, form: FormName): ShownForm {
  return property.forms.find((one) => one.form === form) ?? property;
}
