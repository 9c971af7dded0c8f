/** The declared numbers of a formulation, in step with its text both ways. */
import { useState } from 'react';
import type { DeclaredQuantityView } from '../../../shared/contracts/derivation.ts';
import { Formula, writtenUnit } from '../../components/index.ts';
import { positionOf, valueAt, writtenNumber } from './writeValue.ts';

interface ParameterTableProps {
  readonly quantities: readonly DeclaredQuantityView[];
  /** False where the text has moved on from what the table shows. */
  readonly mayEdit: boolean;
  readonly onWrite: (quantity: DeclaredQuantityView, written: string) => void;
}

const STEPS = 1000;

export function ParameterTable({ quantities, mayEdit, onWrite }: ParameterTableProps) {
  const parameters = quantities.filter(({ kind }) => kind === 'parameter');
  if (parameters.length === 0) return null;
  return (
    <table className="parameters text-label mt-22 w-full font-mono">
      <caption className="text-ink-3 border-rule border-b py-8 text-left">Parameters</caption>
      <thead className="text-ink-3">
        <tr>
          <th scope="col">
            <span className="sr-only">name</span>
          </th>
          <th scope="col">value</th>
          <th scope="col">unit</th>
          <th scope="col">range</th>
          <th scope="col" className="text-right">
            ± u
          </th>
        </tr>
      </thead>
      <tbody>
        {parameters.map((quantity) => (
          <Row key={quantity.name} {...{ quantity, mayEdit, onWrite }} />
        ))}
      </tbody>
    </table>
  );
}

function Row({
  quantity,
  mayEdit,
  onWrite,
}: {
  readonly quantity: DeclaredQuantityView;
  readonly mayEdit: boolean;
  readonly onWrite: ParameterTableProps['onWrite'];
}) {
  const { name, tex, description, unit, value, lower, upper, uncertainty } = quantity;
  const [typed, setTyped] = useState<string>();
  const isNumber =
    typed === undefined || /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(typed.trim());
  const write = (): void => {
    if (typed !== undefined && isNumber && Number(typed) !== value) onWrite(quantity, typed.trim());
    if (isNumber) setTyped(undefined);
  };
  const title = description === '' ? name : `${name}, ${description}`;
  return (
    <tr>
      <th scope="row">
        <Formula tex={tex} text={name} />
        <small className="text-ink-3 ml-10">{description}</small>
      </th>
      <td>
        <input
          aria-label={`Value of ${title}${unit === '' ? '' : ` in ${unit}`}`}
          aria-invalid={!isNumber}
          disabled={!mayEdit}
          inputMode="decimal"
          value={typed ?? writtenNumber(value)}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={write}
          onKeyDown={(event) => {
            if (event.key === 'Enter') write();
            if (event.key === 'Escape') setTyped(undefined);
          }}
          className="border-ink-3 text-ink aria-invalid:border-cinnabar w-[104px] border-b bg-transparent py-4 tabular-nums"
        />
        {!isNumber && (
          <span role="alert" className="text-cinnabar block">
            write a number such as 3.7e-49
          </span>
        )}
      </td>
      <td className="text-ink-3">{writtenUnit(unit === '' ? '1' : unit)}</td>
      <td className="parameter-range">
        {lower !== null && upper !== null && (
          <input
            type="range"
            className="slider w-full"
            aria-label={`${title}, from ${writtenNumber(lower)} to ${writtenNumber(upper)}${unit === '' ? '' : ` ${unit}`}`}
            aria-valuetext={`${writtenNumber(value)} ${unit}`}
            disabled={!mayEdit}
            min={0}
            max={STEPS}
            value={Math.round(positionOf(value, lower, upper) * STEPS)}
            onChange={(event) =>
              onWrite(
                quantity,
                writtenNumber(
                  Number(valueAt(Number(event.target.value) / STEPS, lower, upper).toPrecision(4)),
                ),
              )
            }
          />
        )}
      </td>
      <td className="text-ink-2 text-right tabular-nums">
        {uncertainty === null ? '' : writtenNumber(uncertainty)}
      </td>
    </tr>
  );
}
