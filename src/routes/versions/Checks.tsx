/** What was checked of a version and how it came out; what was not passed is shown first. */
import type {
  CheckStatus,
  ClaimResult,
  Verification,
} from '../../../shared/contracts/derivation.ts';
import { Seal, SealMark, SmallHeading } from '../../components/index.ts';

const RANK: Record<CheckStatus, number> = { failed: 0, undecided: 1, passed: 2 };
const WORD: Record<CheckStatus, string> = {
  passed: 'holds',
  failed: 'does not hold',
  undecided: 'not decided',
};

/** How many of the checks of a property were passed, and of how many. */
function count(checks: readonly { readonly status: CheckStatus }[]): {
  passed: number;
  total: number;
} {
  return {
    passed: checks.filter(({ status }) => status === 'passed').length,
    total: checks.length,
  };
}

export function Checks({
  verification,
  claims,
}: {
  readonly verification: Verification;
  readonly claims: readonly ClaimResult[];
}) {
  const properties = [...verification.properties].sort((a, b) => RANK[a.status] - RANK[b.status]);
  return (
    <>
      <SmallHeading>Verification</SmallHeading>
      <ul>
        {properties.map(({ symbol, status, checks }) => (
          <li key={symbol} className="border-hair border-b py-2">
            <details>
              <summary className="flex min-h-28 items-baseline gap-10">
                <span className="text-label text-ink min-w-38 font-mono">{symbol}</span>
                <Seal status={status} {...count(checks)} />
              </summary>
              <ul className="pb-8 pl-14">
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
            </details>
          </li>
        ))}
      </ul>
      {verification.general.length > 0 && (
        <>
          <SmallHeading className="mt-22">The model as a whole</SmallHeading>
          <ul>
            {verification.general.map((check) => (
              <li key={check.kind + check.title} className="py-4">
                <span className="flex items-baseline gap-8">
                  <SealMark status={check.status} />
                  <span className="text-ink">{check.title}</span>
                </span>
                <span className="block">{check.detail}</span>
              </li>
            ))}
          </ul>
        </>
      )}
      {claims.length > 0 && (
        <>
          <SmallHeading className="mt-22">Claims</SmallHeading>
          <ul>
            {claims.map((claim) => (
              <li key={claim.line} className="py-4">
                <span className="flex items-baseline gap-8">
                  <SealMark status={claim.status} />
                  <span className="text-ink">{claim.title || claim.text}</span>
                </span>
                <span className="text-label text-ink-3 block font-mono">
                  {WORD[claim.status]}
                  {claim.method && `, ${claim.method}`}
                </span>
                {claim.detail && <span className="block">{claim.detail}</span>}
              </li>
            ))}
          </ul>
        </>
      )}
    </>
  );
}
