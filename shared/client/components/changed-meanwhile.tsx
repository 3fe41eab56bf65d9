/** Two people changed the same thing: both versions side by side, and a choice instead of an overwrite. */
import { View } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Button } from './button';
import { Card, Row } from './card';
import { Mark } from './mark';
import { Text } from './text';

export interface Difference {
  label: string;
  mine: string;
  theirs: string;
}

interface ChangedMeanwhileProps {
  /** What both changed: `this account`. */
  what: string;
  /** Every value, equal ones too: they are left out here. */
  values: readonly Difference[];
  onKeepMine: () => void;
  onTakeTheirs: () => void;
  isBusy?: boolean;
}

export function ChangedMeanwhile({ what, values, onKeepMine, onTakeTheirs, isBusy }: ChangedMeanwhileProps) {
  const different = values.filter(({ mine, theirs }) => mine !== theirs);
  return (
    <Card tone="weigh" label="Changed meanwhile">
      <View role="alert" style={{ gap: SPACE.m }}>
        <Mark tone="weigh" label={`Somebody changed ${what} meanwhile`} />
        <Text>Nothing was saved. What you typed is still here; compare before you choose.</Text>
        {different.length === 0 ? <Text color="ink2">Their values are the same as yours.</Text> : null}
        {different.map((difference) => (
          <Comparison key={difference.label} {...difference} />
        ))}
      </View>
      <Row>
        <Button label="Take theirs" onPress={onTakeTheirs} />
        <Button label="Save mine over theirs" kind="danger" isBusy={isBusy} onPress={onKeepMine} />
      </Row>
    </Card>
  );
}

function Comparison({ label, mine, theirs }: Difference) {
  const { colors } = useTheme();
  return (
    <View style={{ borderTopWidth: 1, borderTopColor: colors.hairline, paddingTop: SPACE.s, gap: SPACE.xs }}>
      <Text variant="strong">{label}</Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: SPACE.xl, rowGap: SPACE.xs }}>
        <Version whose="Yours" value={mine} />
        <Version whose="Stored now" value={theirs} />
      </View>
    </View>
  );
}

function Version({ whose, value }: { whose: string; value: string }) {
  return (
    <View style={{ flexGrow: 1, flexBasis: 200, minWidth: 0 }}>
      <Text variant="small" color="ink2">
        {whose}
      </Text>
      <Text>{value === '' ? '—' : value}</Text>
    </View>
  );
}
