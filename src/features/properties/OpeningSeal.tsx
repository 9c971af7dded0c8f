/** A seal that opens what was tried, check by check. */
import { useState } from 'react';
import type { CheckStatus, VerificationCheck } from '../../../shared/contracts/derivation.ts';
import { Seal, SealMark } from '../../components/index.ts';

interface OpeningSealProps {
  readonly status: CheckStatus;
  readonly checks: readonly VerificationCheck[];
}

export function OpeningSeal({ status, checks }: OpeningSealProps) {
  const [isOpen, setIsOpen] = useState(false);
  const passed = checks.filter((check) => check.status === 'passed').length;
  return (
    <div>
      <Seal
        status={status}
        passed={passed}
        total={checks.length}
        isOpen={isOpen}
        onOpen={() => setIsOpen(!isOpen)}
      />
      {isOpen && (
        <ul className="mt-8">
          {checks.map((check) => (
            <li key={check.kind + check.title} className="py-4">
              <span className="flex items-baseline gap-8">
                <SealMark status={check.status} />
                <span className="text-ink">{check.title}</span>
              </span>
              <span className="block">{check.detail}</span>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
