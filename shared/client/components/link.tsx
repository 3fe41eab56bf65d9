/** A real link, with an address that can be opened in another tab or sent to a colleague. */
import { Link as RouterLink } from 'expo-router';
import type { Href } from 'expo-router';
import { useTheme } from '@/shared/client/theme/theme-context';
import { FONT, RADIUS, SIZE, SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';

export interface LinkProps {
  href: Href;
  label: string;
  /** `text` inside running words, `row` as the name of a row, `button` as an action, `primary` as the main one. */
  kind?: 'text' | 'row' | 'button' | 'primary';
  accessibleLabel?: string;
  isCurrent?: boolean;
}

export function Link({ href, label, kind = 'text', accessibleLabel, isCurrent }: LinkProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const isButton = kind === 'button' || kind === 'primary';
  return (
    <RouterLink
      href={href}
      aria-label={accessibleLabel}
      {...(isCurrent ? { 'aria-current': 'page' as const } : {})}
      {...({ onFocus: ring.onFocus, onBlur: ring.onBlur } as object)}
      style={[
        {
          color: kind === 'primary' ? colors.onSea : colors.sea,
          fontFamily: FONT.wordsBold,
          fontSize: SIZE.body,
          lineHeight: isButton ? TOUCH_PX - 2 : Math.round(SIZE.body * 1.4),
          textDecorationLine: isButton ? 'none' : 'underline',
          alignSelf: 'flex-start',
        },
        isButton && {
          paddingHorizontal: SPACE.l,
          borderWidth: 1,
          borderColor: colors.sea,
          borderRadius: RADIUS,
          backgroundColor: kind === 'primary' ? colors.sea : colors.surface,
          textAlign: 'center',
        },
        // Reaches into the row's own padding: big enough for a finger, no taller to the eye.
        kind === 'row' && { paddingVertical: SPACE.m, marginVertical: -SPACE.m },
        ring.style,
      ]}
    >
      {label}
    </RouterLink>
  );
}
