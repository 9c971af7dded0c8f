/** Faults that the server found in a form, put beside the fields that they concern. */
import type { FieldValues, Path, UseFormSetError } from 'react-hook-form';
import { describeFault, ProblemError } from '../api/problem.ts';

/**
 * Marks the fields named by the problem and returns what remains to be said of the form as a
 * whole; undefined where the fields say it all.
 */
export function showFaults<Values extends FieldValues>(
  fault: unknown,
  fields: readonly Path<Values>[],
  setError: UseFormSetError<Values>,
): string | undefined {
  if (!(fault instanceof ProblemError)) return describeFault(fault);
  let isMarked = false;
  for (const field of fields) {
    const message = fault.fields[field];
    if (message === undefined) continue;
    setError(field, { message }, { shouldFocus: !isMarked });
    isMarked = true;
  }
  return isMarked ? undefined : fault.message;
}
