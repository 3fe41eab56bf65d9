/**
 * Who may do what. One table, read by the server (which enforces it) and by the client (which hides what
 * would be refused). A person can hold several roles: the union of their permissions counts.
 */
import { z } from 'zod';

export const ROLES = ['technician', 'surgeon', 'counsellor', 'nurse', 'administrator'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

export const ROLE_NAMES: Record<Role, string> = {
  technician: 'Technician',
  surgeon: 'Surgeon',
  counsellor: 'Counsellor',
  nurse: 'Theatre nurse',
  administrator: 'Administrator',
};

export const PERMISSIONS = {
  /** Patients, their eyes, measurements and flags. */
  'patient.read': ['technician', 'surgeon', 'counsellor', 'nurse'],
  /** Register and correct patients, record the eye's history. */
  'patient.write': ['technician'],
  /** Upload and enter biometry, see imports. */
  'measurement.write': ['technician'],
  /** The imported file behind a measurement. */
  'import.read': ['technician', 'surgeon'],
  /** Settle a stop by name and reason. */
  'flag.settle': ['technician', 'surgeon'],
  'lens.read': ['surgeon', 'counsellor', 'nurse', 'administrator'],
  'lens.write': ['administrator'],
  /** Draft plans and their calculations. */
  'plan.write': ['surgeon'],
  'plan.sign': ['surgeon'],
  /** Signed plans and their sheet. */
  'plan.read': ['surgeon', 'counsellor', 'nurse'],
  'account.manage': ['administrator'],
  'audit.read': ['administrator'],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

/** True when any of the roles carries the permission. */
export function hasPermission(roles: readonly Role[], permission: Permission): boolean {
  const allowed: readonly Role[] = PERMISSIONS[permission];
  return roles.some((role) => allowed.includes(role));
}
