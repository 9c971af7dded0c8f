/** The state at which the sheet shows numbers, each variable with its unit. */
import { useState } from 'react';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { Formula, SmallHeading, writtenUnit } from '../../components/index.ts';
import type { StatePoint } from './statePoint.ts';

interface StateTableProps {
  readonly variables: Derivation['variables'];
  readonly state: StatePoint;
  readonly onChange: (state: StatePoint) => void;
}

export function StateTable({ variables, state, onChange }: StateTableProps) {
  return (
    <section aria-label="State">
      <SmallHeading>Numbers at this state</SmallHeading>
      <table className="text-label w-full font-mono">
        <tbody>
          {variables.map((variable) => (
            <tr key={variable.name} className="border-rule border-b border-dotted">
              <th scope="row" className="text-ink-3 py-4 pr-10 text-left font-normal">
                <Formula tex={variable.tex} text={variable.name} />
              </th>
              <td className="py-2">
                <ValueField
                  label={`${variable.role} ${variable.name}${variable.unit === '1' ? '' : ` in ${variable.unit}`}`}
                  value={state[variable.name] ?? NaN}
                  onChange={(value) => onChange({ ...state, [variable.name]: value })}
                />
              </td>
              <td className="text-ink-3 py-4 pl-10">
                {variable.unit === '1' ? '' : writtenUnit(variable.unit)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

function ValueField({
  label,
  value,
  onChange,
}: {
  readonly label: string;
  readonly value: number;
  readonly onChange: (value: number) => void;
}) {
  const [typed, setTyped] = useState<string>();
  const parsed = typed === undefined ? value : Number(typed);
  const isNumber = typed === undefined || (typed.trim() !== '' && Number.isFinite(parsed));
  const take = (): void => {
    if (typed !== undefined && isNumber) onChange(parsed);
    if (isNumber) setTyped(undefined);
  };
  return (
    <input
      aria-label={label}
      aria-invalid={!isNumber}
      inputMode="decimal"
      value={typed ?? String(value).replace('e+', 'e')}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={take}
      onKeyDown={(event) => {
        if (event.key === 'Enter') take();
        if (event.key === 'Escape') setTyped(undefined);
      }}
      className="border-ink-3 text-ink aria-invalid:border-cinnabar min-h-28 w-full border-b bg-transparent text-right tabular-nums"
    />
  );
}
