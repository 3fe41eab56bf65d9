/** The constants of one formula and one origin: values, whose they are, and their date. */
import { View } from 'react-native';
import { CONSTANT_KEYS, FORMULA_NAMES } from '@/shared/contract';
import { DateField } from '@/shared/client/components/date-field';
import { DecimalField, TextField } from '@/shared/client/components/field';
import { Rule } from '@/shared/client/components/card';
import { Text } from '@/shared/client/components/text';
import { SPACE } from '@/shared/client/theme/tokens';
import { CONSTANT_LABELS } from './lens-form-values';
import type { ConstantText } from './lens-form-values';

interface ConstantLineProps {
  line: ConstantText;
  isReadOnly: boolean;
  onChange: (part: Partial<ConstantText>) => void;
}

export function ConstantLine({ line, isReadOnly, onChange }: ConstantLineProps) {
  const setValue = (index: number, text: string) =>
    onChange({ values: line.values.map((other, i) => (i === index ? text : other)) });
  const isMm = (key: string) => key.endsWith('Mm');
  return (
    <View role="group" aria-label={`${FORMULA_NAMES[line.formula]}, ${line.origin}`} style={{ gap: SPACE.s }}>
      <Rule />
      <Text variant="heading" level={3}>
        {FORMULA_NAMES[line.formula]}
      </Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.m }}>
        {CONSTANT_KEYS[line.formula].map((key, index) => (
          <View key={key} style={{ flexGrow: 1, flexBasis: 110 }}>
            <DecimalField
              label={CONSTANT_LABELS[key] ?? key}
              unit={isMm(key) ? 'mm' : undefined}
              value={line.values[index] ?? ''}
              onChange={(text) => setValue(index, text)}
              isDisabled={isReadOnly}
            />
          </View>
        ))}
        <View style={{ flexGrow: 3, flexBasis: 220 }}>
          <TextField
            label="Whose"
            value={line.source}
            onChange={(source) => onChange({ source })}
            isDisabled={isReadOnly}
          />
        </View>
        <View style={{ flexGrow: 1, flexBasis: 160 }}>
          <DateField
            label="Dated"
            value={line.dated}
            onChange={(dated) => (isReadOnly ? undefined : onChange({ dated }))}
          />
        </View>
      </View>
    </View>
  );
}
