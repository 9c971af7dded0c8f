/** Rows of the database as the API shows them. */
import type { DerivationProgress, Draft, VersionSummary } from '../../shared/contracts/models.ts';
import type { DerivationRow } from '../models/derivation.ts';
import type { DraftRow } from '../models/draft.ts';
import type { PersonRow } from '../models/person.ts';
import type { VersionRow } from '../models/version.ts';

export function describePerson(person: PersonRow | undefined | null): { id: string; name: string } {
  return { id: person?.id ?? '', name: person?.name ?? 'somebody who has left' };
}

export function describeProgress(derivation: DerivationRow): DerivationProgress {
  return {
    state: derivation.state,
    progress: derivation.progress,
    stage: derivation.stage,
    fault: derivation.fault,
    verification: derivation.verificationStatus,
    updatedAt: derivation.updatedAt.toISOString(),
  };
}

/** Needs the version's `frozenBy` and `derivation` loaded with it. */
export function describeVersion(version: VersionRow): VersionSummary {
  if (!version.derivation) throw new Error(`version ${version.id} was read without its derivation`);
  return {
    id: version.id,
    number: version.number,
    hash: version.hash,
    note: version.note,
    frozenAt: version.frozenAt.toISOString(),
    frozenBy: describePerson(version.frozenBy),
    derivation: describeProgress(version.derivation),
  };
}

export function describeDraft(draft: DraftRow): Draft {
  return {
    source: draft.source,
    revision: draft.revision,
    updatedAt: draft.updatedAt.toISOString(),
    updatedBy: describePerson(draft.updatedBy),
  };
}
