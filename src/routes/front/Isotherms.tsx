/** The isotherms of the specimen, one of which the reader moves. */
import { useMemo, useState } from 'react';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { IsothermPlot } from './IsothermPlot.tsx';
import { MOLAR_UNIT, traceIsotherm } from './portrait.ts';
import { MovingTemperature } from './MovingTemperature.tsx';
import { usePortrait } from './usePortrait.ts';

const FIRST_REDUCED = 0.95;

export function Isotherms({
  derivation,
  isStale,
}: {
  readonly derivation: Derivation;
  readonly isStale: boolean;
}) {
  const { fluid, portrait, isFluid = true } = usePortrait(derivation) ?? {};
  const [reduced, setReduced] = useState(FIRST_REDUCED);

  const critical = portrait?.critical;
  const temperature = reduced * (critical?.temperature ?? 300);
  const moving = useMemo(() => {
    if (!fluid || !portrait) return undefined;
    const unit = critical ?? MOLAR_UNIT;
    return {
      label: 'moving',
      points: traceIsotherm(fluid, temperature, portrait.xRange, unit),
    };
  }, [fluid, portrait, critical, temperature]);

  if (!isFluid) return null;
  if (!fluid) return <div className="mt-14 min-h-[360px]" />;
  if (!portrait) {
    return (
      <p className="text-note text-ink-2 py-14">
        No isotherm is drawn: the pressure has no values over the volumes of a fluid.
      </p>
    );
  }
  return (
    <div className="mt-14">
      <div className={isStale ? 'opacity-[0.62]' : undefined}>
        <IsothermPlot portrait={portrait} moving={moving} />
      </div>
      <MovingTemperature
        reduced={reduced}
        temperature={temperature}
        critical={critical}
        onChange={setReduced}
      />
    </div>
  );
}
