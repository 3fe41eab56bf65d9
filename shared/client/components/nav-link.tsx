/** One place in the rail or the bar: sign and word, the current one marked by a rule as well as by colour. */
import type { ReactNode } from 'react';
import { Link as RouterLink } from 'expo-router';
import type { Href } from 'expo-router';
import { Pressable } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';
import { Text } from './text';

interface NavLinkProps {
  href: Href;
  label: string;
  icon: (colour: string) => ReactNode;
  isCurrent: boolean;
  shape: 'rail' | 'bar';
}

export function NavLink({ href, label, icon, isCurrent, shape }: NavLinkProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const isRail = shape === 'rail';
  const colour = isCurrent ? colors.sea : colors.ink2;
  return (
    <RouterLink href={href} asChild {...({ 'aria-current': isCurrent ? 'page' : undefined } as object)}>
      <Pressable
        onFocus={ring.onFocus}
        onBlur={ring.onBlur}
        style={{
          ...ring.style,
          flexDirection: isRail ? 'row' : 'column',
          alignItems: 'center',
          justifyContent: isRail ? 'flex-start' : 'center',
          gap: isRail ? SPACE.m : 2,
          minHeight: isRail ? TOUCH_PX : 56,
          flex: isRail ? undefined : 1,
          minWidth: 0,
          paddingHorizontal: isRail ? SPACE.l : 2,
          borderLeftWidth: isRail ? 4 : 0,
          borderTopWidth: isRail ? 0 : 3,
          borderColor: isCurrent ? colors.sea : 'transparent',
        }}
      >
        {icon(colour)}
        <Text
          variant={isRail ? (isCurrent ? 'strong' : 'body') : 'small'}
          color={isCurrent ? 'sea' : 'ink2'}
          numberOfLines={1}
        >
          {label}
        </Text>
      </Pressable>
    </RouterLink>
  );
}
