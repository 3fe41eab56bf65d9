/** A button with the shape of a place in the bottom bar. */
import type { ReactNode } from 'react';
import { Pressable } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { useFocusRing } from './focus-ring';
import { Text } from './text';

export function BarButton({
  label,
  icon,
  onPress,
}: {
  label: string;
  icon: (colour: string) => ReactNode;
  onPress: () => void;
}) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  return (
    <Pressable
      role="button"
      onPress={onPress}
      onFocus={ring.onFocus}
      onBlur={ring.onBlur}
      style={[
        {
          flex: 1,
          minHeight: 56,
          alignItems: 'center',
          justifyContent: 'center',
          gap: 2,
          borderTopWidth: 3,
          borderColor: 'transparent',
        },
        ring.style,
      ]}
    >
      {icon(colors.ink2)}
      <Text variant="small" color="ink2">
        {label}
      </Text>
    </Pressable>
  );
}
