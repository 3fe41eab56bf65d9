/** One place in the rail or the bar: sign and word, the current one marked by a rule as well as by colour. */
import type { ReactNode } from 'react';
import { Link as RouterLink } from 'expo-router';
import type { Href } from 'expo-router';
import { Pressable } from 'react-native';
import type { ViewStyle } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';
import { Text } from './text';
import type { TextVariant } from './text';

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
  const color = isCurrent ? 'sea' : 'ink2';
  return (
    <RouterLink href={href} asChild {...({ 'aria-current': isCurrent ? 'page' : undefined } as object)}>
      <Pressable
        onFocus={ring.onFocus}
        onBlur={ring.onBlur}
        style={{ ...ring.style, ...SHAPES[shape], borderColor: isCurrent ? colors.sea : 'transparent' }}
      >
        {icon(colors[color])}
        <Text variant={variantFor(shape, isCurrent)} color={color} numberOfLines={1}>
          {label}
        </Text>
      </Pressable>
    </RouterLink>
  );
}

function variantFor(shape: NavLinkProps['shape'], isCurrent: boolean): TextVariant {
  if (shape === 'bar') return 'small';
  return isCurrent ? 'strong' : 'body';
}

const SHAPES: Record<NavLinkProps['shape'], ViewStyle> = {
  rail: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: SPACE.m,
    minHeight: TOUCH_PX,
    minWidth: 0,
    paddingHorizontal: SPACE.l,
    borderLeftWidth: 4,
  },
  bar: {
    flexDirection: 'column',
    alignItems: 'center',
    justifyContent: 'center',
    gap: 2,
    minHeight: 56,
    minWidth: 0,
    flex: 1,
    paddingHorizontal: 2,
    borderTopWidth: 3,
  },
};
