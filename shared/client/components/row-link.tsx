/** A whole row that opens something: title, one line of detail, the side in words. */
import { Link as RouterLink } from 'expo-router';
import type { Href } from 'expo-router';
import { Pressable, View } from 'react-native';
import type { Side } from '@/shared/contract';
import { sideWords } from '@/shared/client/lib/format';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';
import { Text } from './text';

interface RowLinkProps {
  href: Href;
  title: string;
  detail: string;
  side?: Side | null;
  hasRule?: boolean;
}

export function RowLink({ href, title, detail, side, hasRule = false }: RowLinkProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  return (
    <View role="listitem" style={{ borderTopWidth: hasRule ? 1 : 0, borderTopColor: colors.hairline }}>
      <RouterLink href={href} asChild>
        <Pressable
          onFocus={ring.onFocus}
          onBlur={ring.onBlur}
          style={{
            ...ring.style,
            minHeight: TOUCH_PX,
            paddingVertical: SPACE.s,
            gap: 2,
            justifyContent: 'center',
          }}
        >
          <View
            style={{ flexDirection: 'row', justifyContent: 'space-between', flexWrap: 'wrap', gap: SPACE.s }}
          >
            <Text variant="strong" color="sea">
              {title}
            </Text>
            {side ? <Text variant="strong">{sideWords(side)}</Text> : null}
          </View>
          {detail ? <Text color="ink2">{detail}</Text> : null}
        </Pressable>
      </RouterLink>
    </View>
  );
}
