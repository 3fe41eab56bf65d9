import { ROLES } from '@/shared/contract';
import type { Role } from '@/shared/contract';
import { placesFor } from '@/shared/client/features/shell/places';

const labelsFor = (...roles: Role[]) => placesFor(roles).map(({ label }) => label);

describe('the places of a role', () => {
  it.each<[Role, string[]]>([
    ['technician', ['Home', 'Patients', 'Imports']],
    ['surgeon', ['Home', 'Patients', 'Plans', 'Lenses']],
    ['counsellor', ['Home', 'Patients', 'Plans']],
    ['nurse', ['Home', 'Patients', 'Plans']],
    ['administrator', ['Home', 'Lenses', 'Accounts', 'Outbox', 'Audit']],
  ])('%s', (role, labels) => {
    expect(labelsFor(role)).toEqual(labels);
  });

  it('add up for a person with several', () => {
    expect(labelsFor(...ROLES)).toEqual([
      'Home',
      'Patients',
      'Imports',
      'Plans',
      'Lenses',
      'Accounts',
      'Outbox',
      'Audit',
    ]);
  });
});
