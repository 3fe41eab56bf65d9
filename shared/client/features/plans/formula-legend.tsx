/** Which shape is which formula, and what the hill, the band and the line mean. */
import { View } from 'react-native';
import Svg from 'react-native-svg';
import type { FormulaId } from '@/formulas';
import { FORMULA_NAMES } from '@/shared/contract';
import { Text } from '@/shared/client/components/text';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { FormulaMark } from './formula-mark';

export function FormulaLegend({
  formulas,
  leading,
}: {
  formulas: readonly FormulaId[];
  leading: FormulaId | null;
}) {
  const { colors } = useTheme();
  return (
    <View style={{ gap: SPACE.xs }}>
      <View
        role="list"
        aria-label="Formula marks"
        style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: SPACE.l, rowGap: SPACE.xs }}
      >
        {formulas.map((formula) => (
          <View
            key={formula}
            role="listitem"
            style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.xs }}
          >
            <Svg width={18} height={18} aria-hidden>
              <FormulaMark
                formula={formula}
                xPx={9}
                yPx={9}
                colour={colors.ink}
                paper={colors.surface}
                isLeading={formula === leading}
              />
            </Svg>
            <Text variant="small">{`${FORMULA_NAMES[formula]}${formula === leading ? ' (leads)' : ''}`}</Text>
          </View>
        ))}
      </View>
      <Text variant="small" color="ink2">
        Hill: where the refraction is likely to land by the leading formula. Line: target; shaded: tolerance.
        More nearsighted to the left.
      </Text>
    </View>
  );
}
