/** What the product is and is not, and how it looks on this computer. */
import { FORMULA_VERSION } from '@/formulas';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { RadioGroup } from '@/shared/client/components/choices';
import { Link } from '@/shared/client/components/link';
import { Screen } from '@/shared/client/components/screen';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { signOut } from '@/shared/client/api/session';
import { useTheme } from '@/shared/client/theme/theme-context';
import type { ThemeChoice } from '@/shared/client/theme/theme-context';

const THEMES: { value: ThemeChoice; label: string }[] = [
  { value: 'auto', label: 'As the computer' },
  { value: 'day', label: 'Day' },
  { value: 'night', label: 'Night' },
];

const CAUTIONS = [
  'Landfall supports the decisions of trained clinicians. It does not replace judgement, the device’s own printout, local codes or licensed practice.',
  'The surgeon is responsible for the lens. Check every input against its source before signing.',
  'A predicted refraction is an estimate: it lands in a range, and the chance of landing says how often within the tolerance.',
  'Plain formulas do not hold after corneal refractive surgery, in keratoconus, in children, or in an eye filled with silicone oil; Landfall is silent there rather than wrong.',
  'Formula coefficients carry a mark that says how far each was checked against print. Those recalled from memory are to be checked against the paper before clinical release.',
  'Not for emergencies. Not certified as a medical device.',
];

export function AboutScreen() {
  const { choice, setChoice } = useTheme();
  return (
    <Screen title="About and settings" back="/home" width="reading" hasCautions={false}>
      <Card title="Appearance">
        <RadioGroup
          label="Light"
          options={THEMES}
          value={choice}
          onChange={setChoice}
          hint="Night is for theatre and dim rooms."
        />
      </Card>
      <Card title="Cautions" tone="rust">
        {CAUTIONS.map((caution) => (
          <Text key={caution}>{caution}</Text>
        ))}
      </Card>
      <Card title="Conventions">
        <Facts
          items={[
            { label: 'Prediction error', value: 'achieved minus predicted; + is a farsighted surprise' },
            { label: 'Right eye', value: 'stands on the left, as one faces the patient' },
            { label: 'Keratometry', value: 'index 1.3375 unless said otherwise' },
            { label: 'Spectacle distance', value: '12 mm' },
            { label: 'Formula version', value: FORMULA_VERSION, isNumber: true },
          ]}
        />
        <Link href="/method" label="Methods: formulas, checks and their sources" />
      </Card>
      <Row>
        <Button label="Sign out" onPress={() => void signOut()} />
      </Row>
    </Screen>
  );
}
