/** Who may call which route, written by hand from the duties of the roles. */
import type { Role } from '@/shared/contract';

export type Who = 'public' | 'signed-in' | readonly Role[];

export const ROUTES_BY_HAND: Record<string, Who> = {
  'GET /api/practice': 'public',
  'POST /api/setup': 'public',
  'GET /api/openapi.json': 'public',
  'POST /api/auth/sign-in': 'public',
  'POST /api/auth/refresh': 'public',
  'POST /api/auth/sign-out': 'public',
  'POST /api/auth/password-reset': 'public',
  'GET /api/auth/links/:token': 'public',
  'POST /api/auth/links/:token': 'public',
  'GET /api/auth/me': 'signed-in',
  'GET /api/home': 'signed-in',
  'GET /api/accounts': ['administrator'],
  'POST /api/accounts': ['administrator'],
  'PUT /api/accounts/:id': ['administrator'],
  'POST /api/accounts/:id/invitation': ['administrator'],
  'GET /api/outbox': ['administrator'],
  'GET /api/audit': ['administrator'],
  'GET /api/measurements/:id': ['technician', 'surgeon', 'counsellor', 'nurse'],
  'GET /api/imports': ['technician', 'surgeon'],
  'GET /api/imports/template.csv': ['technician', 'surgeon'],
  'GET /api/imports/demo.csv': ['technician', 'surgeon'],
  'GET /api/imports/:id': ['technician', 'surgeon'],
  'GET /api/imports/:id/rows': ['technician', 'surgeon'],
  'GET /api/imports/:id/file': ['technician', 'surgeon'],
  'POST /api/imports': ['technician'],
  'POST /api/imports/:id/confirm': ['technician'],
  'POST /api/imports/:id/discard': ['technician'],
};
