/** A calculator for any thermodynamic partial derivative: what, by what, and what is held. */
import { useState } from 'react';
import { symbolsOf } from '../../../shared/algebra/traverse.ts';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { fromJson } from '../../../shared/print/json.ts';
import { Dialog, DisplayFormula, Formula, writtenUnit } from '../../components/index.ts';
import { useAnyDerivative } from '../../workers/useAnyDerivative.ts';
import { CopyButton } from './CopyButton.tsx';
import { valueAt, writtenValue, type StatePoint } from './statePoint.ts';

interface DerivativeDialogProps {
  readonly source: string;
  readonly derivation: Derivation;
  readonly state: StatePoint;
  readonly onClose: () => void;
}

interface Choice {
  readonly name: string;
  readonly tex: string;
  readonly title: string;
}

export function DerivativeDialog({ source, derivation, state, onClose }: DerivativeDialogProps) {
  const choices = choicesOf(derivation);
  const [question, setQuestion] = useState(() => firstQuestion(derivation, choices));
  const answer = useAnyDerivative(source, question);
  const texOf = (name: string): string => choices.find((one) => one.name === name)?.tex ?? name;
  const left = derivativeTex(question.of, question.by, question.held, texOf);
  const value = answer?.kind === 'found' ? valueAt(answer.tree, derivation, state) : undefined;
  return (
    <Dialog title="Any derivative" onClose={onClose}>
      <div className="text-label text-ink-2 grid grid-cols-2 items-end gap-14 font-mono">
        <Choose
          label="derivative of"
          {...{ choices }}
          value={question.of}
          onChange={(of) => setQuestion({ ...question, of })}
        />
        <Choose
          label="by"
          {...{ choices }}
          value={question.by}
          onChange={(by) => setQuestion({ ...question, by })}
        />
        {question.held.map((name, index) => (
          <Choose
            key={index}
            label={index === 0 ? 'at constant' : 'and'}
            {...{ choices }}
            value={name}
            onChange={(next) =>
              setQuestion({
                ...question,
                held: question.held.map((z, i) => (i === index ? next : z)),
              })
            }
          />
        ))}
      </div>
      <div aria-live="polite" aria-busy={answer === undefined} className="mt-22 min-h-[110px]">
        {answer === undefined && (
          <>
            <DisplayFormula tex={left} label="the derivative" />
            <p className="text-note text-ink-3">Working it out</p>
          </>
        )}
        {answer?.kind === 'none' && (
          <>
            <DisplayFormula tex={left} label="the derivative" />
            <p className="text-note text-cinnabar">{answer.why}</p>
          </>
        )}
        {answer?.kind === 'found' && (
          <>
            <DisplayFormula
              tex={`${left} = ${answer.tex}`}
              text={answer.text}
              label="the derivative"
            />
            <p className="text-label text-ink-3 flex flex-wrap items-baseline gap-x-14 font-mono">
              <span>
                {value === undefined
                  ? 'no value at this state'
                  : `${writtenValue(value)} ${answer.unit === '1' ? '' : writtenUnit(answer.unit)} at the state of the sheet`}
              </span>
              <span className="ml-auto flex gap-8">
                <CopyButton what={`${left} = ${answer.tex}`} label="Copy the derivative as TeX">
                  TeX
                </CopyButton>
                <CopyButton
                  what={`partial(${question.of}, ${question.by}; ${question.held.join(', ')}) = ${answer.text}`}
                  label="Copy the derivative as text"
                >
                  text
                </CopyButton>
              </span>
            </p>
          </>
        )}
      </div>
      <p className="text-note text-ink-3 mt-14">
        By Jacobians in the natural variables{' '}
        {naturalsOf(derivation).map(({ name, tex }, index) => (
          <span key={name}>
            {index > 0 && ', '}
            <Formula tex={tex} text={name} />
          </span>
        ))}
        ; in a claim or report it is written{' '}
        <code>
          partial({question.of}, {question.by}; {question.held.join(', ')})
        </code>
        .
      </p>
    </Dialog>
  );
}

function Choose({
  label,
  choices,
  value,
  onChange,
}: {
  readonly label: string;
  readonly choices: readonly Choice[];
  readonly value: string;
  readonly onChange: (name: string) => void;
}) {
  return (
    <label className="min-w-0">
      <span className="block">{label}</span>
      <select
        value={value}
        onChange={(event) => onChange(event.target.value)}
        className="border-ink-3 bg-sheet text-ink mt-4 min-h-32 w-full rounded border px-8"
      >
        {choices.map(({ name, title }) => (
          <option key={name} value={name}>
            {name}
            {title === '' ? '' : `, ${title}`}
          </option>
        ))}
      </select>
    </label>
  );
}

/** The natural variables that ln of the partition function contains. */
function naturalsOf({ variables, lnPartitionFunction }: Derivation): Derivation['variables'] {
  const names = new Set([...symbolsOf(fromJson(lnPartitionFunction.tree))].map(({ name }) => name));
  return variables.filter(({ name }) => names.has(name));
}

/** Natural variables first, then the properties. */
function choicesOf(derivation: Derivation): Choice[] {
  return [
    ...naturalsOf(derivation).map(({ name, tex, role, description }) => ({
      name,
      tex,
      title: description === '' ? role : description,
    })),
    ...derivation.properties
      .filter(({ symbol }) => !derivation.variables.some(({ name }) => name === symbol))
      .map(({ symbol, symbolTex, name }) => ({ name: symbol, tex: symbolTex, title: name })),
  ];
}

/** The pressure by the temperature in a fluid of fixed size; what is like it in other models. */
function firstQuestion(derivation: Derivation, choices: readonly Choice[]) {
  const naturals = naturalsOf(derivation);
  const by = naturals.find(({ role }) => role === 'temperature') ?? naturals[0];
  const held = naturals
    .filter((one) => one !== by)
    .sort((a, b) => Number(a.role === 'number') - Number(b.role === 'number'))
    .map(({ name }) => name);
  const isOffered = (name: string): boolean => choices.some((one) => one.name === name);
  const of = ['p', 'S', 'U'].find((name) => isOffered(name) && !held.includes(name));
  return { of: of ?? choices[0]?.name ?? '', by: by?.name ?? '', held };
}

/** `(∂X/∂Y)_{Z, …}` in TeX. */
export function derivativeTex(
  of: string,
  by: string,
  held: readonly string[],
  texOf: (name: string) => string,
): string {
  return `\\left(\\frac{\\partial ${texOf(of)}}{\\partial ${texOf(by)}}\\right)_{${held.map(texOf).join(', ')}}`;
}
