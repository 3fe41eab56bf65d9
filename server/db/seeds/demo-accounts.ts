/**
 * The people of the demonstration, one per role. All invented; their passwords are shown on the sign-in page and
 * are of use only where the data are invented too.
 */
import type { Role } from '@/shared/contract';

export interface DemoAccount {
  email: string;
  password: string;
  displayName: string;
  roles: Role[];
}

export const DEMO_ACCOUNTS: readonly DemoAccount[] = [
  {
    email: 'technician@landfall.example',
    password: 'quiet-tide-measure',
    displayName: 'Tilda Marsh (demo)',
    roles: ['technician'],
  },
  {
    email: 'surgeon@landfall.example',
    password: 'steady-hand-harbour',
    displayName: 'Ansel Quay (demo)',
    roles: ['surgeon'],
  },
  {
    email: 'counsellor@landfall.example',
    password: 'plain-words-lantern',
    displayName: 'Cora Fenwater (demo)',
    roles: ['counsellor'],
  },
  {
    email: 'nurse@landfall.example',
    password: 'right-lens-lookout',
    displayName: 'Nell Harrowgate (demo)',
    roles: ['nurse'],
  },
  {
    email: 'administrator@landfall.example',
    password: 'keeper-of-the-light',
    displayName: 'Ada Brookline (demo)',
    roles: ['administrator'],
  },
];
