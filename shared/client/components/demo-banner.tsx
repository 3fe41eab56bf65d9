import { View } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Text } from './text';

/** Stands on every screen of the demonstration. */
export function DemoBanner() {
  const { colors } = useTheme();
  return (
    <View style={{ backgroundColor: colors.rust, paddingVertical: 2, paddingHorizontal: SPACE.l }}>
      <Text variant="small" align="center" style={{ color: colors.surface }}>
        Demonstration: people and lenses are invented
      </Text>
    </View>
  );
}
