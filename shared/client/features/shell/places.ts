/** The places of the house, and which roles have a use for them. */
import type { Href } from 'expo-router';
import { hasPermission } from '@/shared/contract';
import type { Role } from '@/shared/contract';

export interface Place {
  href: Href & string;
  label: string;
  /** SVG path in a 24 × 24 box, drawn as a line. */
  icon: string;
}

interface GuardedPlace extends Place {
  isFor: (roles: readonly Role[]) => boolean;
}

const PLACES: readonly GuardedPlace[] = [
  { href: '/home', label: 'Home', icon: 'M4 11 L12 4 L20 11 V20 H14 V14 H10 V20 H4 Z', isFor: () => true },
  {
    href: '/patients',
    label: 'Patients',
    icon: 'M12 12 a4 4 0 1 0 0 -8 a4 4 0 0 0 0 8 Z M4 20 c0 -5 4 -6 8 -6 s8 1 8 6',
    isFor: (roles) => hasPermission(roles, 'patient.read'),
  },
  {
    href: '/imports',
    label: 'Imports',
    icon: 'M12 4 V15 M7 10 L12 15 L17 10 M4 20 H20',
    isFor: (roles) => hasPermission(roles, 'measurement.write'),
  },
  {
    href: '/plans',
    label: 'Plans',
    icon: 'M3 18 C8 18 8 7 12 7 S16 18 21 18 M12 3 V21',
    isFor: (roles) => hasPermission(roles, 'plan.read'),
  },
  {
    href: '/lenses',
    label: 'Lenses',
    icon: 'M12 4 C17 8 17 16 12 20 C7 16 7 8 12 4 Z M7 8 C4 6 4 5 3 5 M17 16 C20 18 20 19 21 19',
    isFor: (roles) => roles.includes('surgeon') || roles.includes('administrator'),
  },
  {
    href: '/accounts',
    label: 'Accounts',
    icon: 'M9 11 a3.5 3.5 0 1 0 0 -7 a3.5 3.5 0 0 0 0 7 Z M2 20 c0 -5 3 -6 7 -6 s7 1 7 6 M18 8 v8 M14 12 h8',
    isFor: (roles) => hasPermission(roles, 'account.manage'),
  },
  {
    href: '/outbox',
    label: 'Outbox',
    icon: 'M3 6 H21 V18 H3 Z M3 7 L12 13 L21 7',
    isFor: (roles) => hasPermission(roles, 'account.manage'),
  },
  {
    href: '/audit',
    label: 'Audit',
    icon: 'M6 3 H18 V21 H6 Z M9 8 H15 M9 12 H15 M9 16 H13',
    isFor: (roles) => hasPermission(roles, 'audit.read'),
  },
];

export function placesFor(roles: readonly Role[]): Place[] {
  return PLACES.filter((place) => place.isFor(roles));
}

/** A phone's bottom bar holds five at most, the last of them "More". */
export const BAR_PLACES_MAX = 5;
