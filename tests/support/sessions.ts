/** Sessions of invented people for client tests. */
import type { Role, Session } from '@/shared/contract';

export function aSession({
  id = '11111111-1111-4111-8111-111111111111',
  displayName = 'Ada Quill',
  roles = ['technician'] as Role[],
  accessToken = 'first-token',
} = {}): Session {
  return { accessToken, expiresInS: 600, user: { id, email: 'ada@practice.example', displayName, roles } };
}

export const OTHER_PERSON_ID = '22222222-2222-4222-8222-222222222222';
