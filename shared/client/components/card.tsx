/** A sheet of paper on the table: the surface on which one matter stands. */
import { View } from 'react-native';
import type { ReactNode } from 'react';
import { useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SHADOW, SPACE } from '@/shared/client/theme/tokens';
import { Text } from './text';

interface CardProps {
  title?: string;
  /** Beside the title: an action or a mark. */
  aside?: ReactNode;
  children: ReactNode;
  /** Draws a rule in this colour along the top. */
  tone?: 'sea' | 'rust' | 'stop' | 'weigh' | 'note' | 'fair';
  label?: string;
}

export function Card({ title, aside, children, tone, label }: CardProps) {
  const { colors } = useTheme();
  return (
    <View
      role={title || label ? 'region' : undefined}
      aria-label={label ?? title}
      style={{
        backgroundColor: colors.surface,
        borderRadius: RADIUS,
        padding: SPACE.l,
        gap: SPACE.m,
        boxShadow: SHADOW,
        borderTopWidth: tone ? 3 : 0,
        borderTopColor: tone ? colors[tone] : undefined,
      }}
    >
      {title ? (
        <View
          style={{
            flexDirection: 'row',
            flexWrap: 'wrap',
            alignItems: 'center',
            justifyContent: 'space-between',
            gap: SPACE.s,
          }}
        >
          <Text variant="heading" level={2}>
            {title}
          </Text>
          {aside}
        </View>
      ) : null}
      {children}
    </View>
  );
}

/** Children side by side where there is room, wrapping under each other where not. */
export function Row({
  children,
  gap = SPACE.m,
  align = 'center',
}: {
  children: ReactNode;
  gap?: number;
  align?: 'center' | 'flex-start' | 'flex-end' | 'stretch';
}) {
  return <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: align, gap }}>{children}</View>;
}

export function Stack({ children, gap = SPACE.m }: { children: ReactNode; gap?: number }) {
  return <View style={{ gap }}>{children}</View>;
}

/** Two columns of equal width on a desk, one under the other elsewhere. The right eye comes first: it stands on the left. */
export function TwoColumns({
  children,
  isSplit,
  gap = SPACE.l,
}: {
  children: ReactNode[];
  isSplit: boolean;
  gap?: number;
}) {
  return (
    <View style={{ flexDirection: isSplit ? 'row' : 'column', gap, alignItems: 'stretch' }}>
      {children.map((child, index) => (
        <View key={index} style={isSplit ? { flex: 1, minWidth: 0, gap } : { gap }}>
          {child}
        </View>
      ))}
    </View>
  );
}

export function Rule() {
  const { colors } = useTheme();
  return <View style={{ height: 1, backgroundColor: colors.hairline }} />;
}
