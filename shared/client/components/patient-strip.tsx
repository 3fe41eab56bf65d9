/** Whose record this is, always in sight: full name, birth date, record number and, where it matters, the side. */
import { View } from 'react-native';
import type { Patient, Side } from '@/shared/contract';
import { formatDate, sideWords } from '@/shared/client/lib/format';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Link } from './link';
import { Tag } from './mark';
import { Text } from './text';

type StripPatient = Pick<
  Patient,
  'id' | 'familyName' | 'givenName' | 'birthDate' | 'recordNumber' | 'isDemo'
>;

export function PatientStrip({ patient, side }: { patient: StripPatient; side?: Side }) {
  const { colors } = useTheme();
  const { isPhone } = useLayout();
  return (
    <View
      role="region"
      aria-label="Patient"
      style={{
        backgroundColor: colors.surface,
        borderBottomWidth: 1,
        borderBottomColor: colors.line,
        paddingHorizontal: isPhone ? SPACE.l : SPACE.xl,
        paddingVertical: SPACE.s,
        flexDirection: 'row',
        flexWrap: 'wrap',
        alignItems: 'center',
        columnGap: SPACE.l,
        rowGap: 2,
      }}
    >
      <Link
        href={{ pathname: '/patients/[patientId]', params: { patientId: patient.id } }}
        label={`${patient.familyName}, ${patient.givenName}`}
      />
      <Text variant="small">{`born ${formatDate(patient.birthDate)}`}</Text>
      <Text variant="small" isNumber>
        {patient.recordNumber}
      </Text>
      {patient.isDemo ? <Tag label="invented" /> : null}
      {side ? <SideWords side={side} /> : null}
    </View>
  );
}

/** The side in words and by position: the right eye's mark stands on the left, as one faces the patient. */
export function SideWords({ side, variant = 'heading' }: { side: Side; variant?: 'heading' | 'title' }) {
  const { colors } = useTheme();
  const mark = (isOn: boolean) => (
    <View
      style={{
        width: 12,
        height: 12,
        borderRadius: 6,
        borderWidth: 2,
        borderColor: colors.ink,
        backgroundColor: isOn ? colors.ink : 'transparent',
      }}
    />
  );
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.s }}>
      <View style={{ flexDirection: 'row', gap: 4 }} aria-hidden>
        {mark(side === 'right')}
        {mark(side === 'left')}
      </View>
      <Text variant={variant}>{sideWords(side).toUpperCase()}</Text>
    </View>
  );
}
