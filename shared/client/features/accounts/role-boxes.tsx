import { View } from 'react-native';
import { ROLE_NAMES, ROLES } from '@/shared/contract';
import type { Role } from '@/shared/contract';
import { Checkbox } from '@/shared/client/components/choices';
import { Text } from '@/shared/client/components/text';

const DUTIES: Record<Role, string> = {
  technician: 'registers patients, imports and enters biometry',
  surgeon: 'compares lenses, plans and signs',
  counsellor: 'reads signed plans and talks with patients',
  nurse: 'reads signed plans, checks at the table',
  administrator: 'accounts, lens catalogue, audit trail',
};

export function RoleBoxes({
  roles,
  onChange,
}: {
  roles: readonly Role[];
  onChange: (roles: Role[]) => void;
}) {
  return (
    <View role="group" aria-label="Roles">
      <Text variant="strong">Roles</Text>
      {ROLES.map((role) => (
        <Checkbox
          key={role}
          label={ROLE_NAMES[role]}
          hint={DUTIES[role]}
          isChecked={roles.includes(role)}
          onChange={(isChecked) =>
            onChange(ROLES.filter((other) => (other === role ? isChecked : roles.includes(other))))
          }
        />
      ))}
    </View>
  );
}
