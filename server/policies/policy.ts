/** Who may do what: one table, asked by every route. */
import type { Role } from '../../shared/contracts/people.ts';
import { Fault, notFound } from '../fault.ts';

export type Action =
  | 'read the group'
  | 'create a notebook'
  | 'change a notebook'
  | 'create a model'
  | 'change a model'
  | 'save a draft'
  | 'freeze a version'
  | 'control a derivation';

/** Every role may read; the others are listed. */
const ALLOWED: Readonly<Record<Action, readonly Role[]>> = {
  'read the group': ['reader', 'modeler', 'referee', 'editor'],
  'create a notebook': ['modeler', 'referee', 'editor'],
  'change a notebook': ['modeler', 'referee', 'editor'],
  'create a model': ['modeler', 'referee', 'editor'],
  'change a model': ['modeler', 'referee', 'editor'],
  'save a draft': ['modeler', 'referee', 'editor'],
  'freeze a version': ['modeler', 'referee', 'editor'],
  'control a derivation': ['modeler', 'referee', 'editor'],
};

export function may(role: Role, action: Action): boolean {
  return ALLOWED[action].includes(role);
}

/**
 * Lets the action pass for the role. Throws `not-found` for somebody without a role in the group,
 * `forbidden` for a role that is not enough.
 */
export function requireRole(role: Role | undefined, action: Action): Role {
  if (role === undefined) throw notFound();
  if (!may(role, action)) {
    throw new Fault(
      'forbidden',
      `As a ${role} you may not ${action}. An editor of the group can give you another role.`,
    );
  }
  return role;
}
