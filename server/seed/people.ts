/** The people of the demonstration. All of them, and Hallowmere Works, are invented. */
import type { Role } from '../../shared/contracts/people.ts';

export interface DemonstrationPerson {
  readonly name: string;
  readonly login: string;
  readonly email: string;
  /** The number by which the local identity provider knows the person. */
  readonly subject: string;
  readonly role: Role | undefined;
  readonly isSiteAdministrator?: boolean;
  /** What the sign-in page of the local identity provider says. */
  readonly describes: string;
}

/** For signing in by e-mail; good on the demonstration's own machine only. */
export const DEMONSTRATION_PASSWORD = 'hallowmere-demonstration';

export const DEMONSTRATION_PEOPLE: readonly DemonstrationPerson[] = [
  {
    name: 'I. Varnholt',
    login: 'varnholt',
    email: 'varnholt@hallowmere.example',
    subject: '7001',
    role: 'editor',
    describes: 'editor of Working Fluids: everything in the group',
  },
  {
    name: 'T. Oswin',
    login: 'oswin',
    email: 'oswin@hallowmere.example',
    subject: '7002',
    role: 'modeler',
    describes: 'modeler: writes and freezes formulations',
  },
  {
    name: 'R. Ketteridge',
    login: 'ketteridge',
    email: 'ketteridge@hallowmere.example',
    subject: '7003',
    role: 'referee',
    describes: 'referee: writes models and judges those of others',
  },
  {
    name: 'A. Lindqvar',
    login: 'lindqvar',
    email: 'lindqvar@hallowmere.example',
    subject: '7004',
    role: 'reader',
    describes: 'reader: sees all, changes nothing',
  },
  {
    name: 'S. Marrowby',
    login: 'marrowby',
    email: 'marrowby@hallowmere.example',
    subject: '7005',
    role: undefined,
    isSiteAdministrator: true,
    describes: 'site administrator: belongs to no group',
  },
  {
    name: 'N. Ostrander',
    login: 'ostrander',
    email: 'ostrander@elsewhere.example',
    subject: '7006',
    role: undefined,
    describes: 'a newcomer: belongs to no group yet',
  },
];
