/** The name, over the line where land meets water. */
import { View } from 'react-native';
import Svg, { Path } from 'react-native-svg';
import { Text } from '@/shared/client/components/text';
import { useTheme } from '@/shared/client/theme/theme-context';

export function Wordmark({ isLarge = false }: { isLarge?: boolean }) {
  const { colors } = useTheme();
  const width = isLarge ? 168 : 104;
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <Text variant={isLarge ? 'huge' : 'title'} color="sea">
        Landfall
      </Text>
      <Svg width={width} height={10} viewBox="0 0 168 10" aria-hidden>
        <Path
          d="M0 8 C20 8 24 2 40 2 S60 8 76 8 96 5 112 5 132 8 168 8"
          fill="none"
          stroke={colors.rust}
          strokeWidth={2}
        />
      </Svg>
    </View>
  );
}
