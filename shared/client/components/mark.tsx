/** Severities and states: always a word and a shape, the colour only helps. */
import { View } from 'react-native';
import Svg, { Circle, Path, Rect } from 'react-native-svg';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Text } from './text';

export type MarkTone = 'stop' | 'weigh' | 'note' | 'fair';

const WORDS: Record<MarkTone, string> = { stop: 'Stop', weigh: 'Weigh', note: 'Note', fair: 'In order' };

export function Mark({ tone, label }: { tone: MarkTone; label?: string }) {
  const { colors } = useTheme();
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.xs + 2 }}>
      <MarkShape tone={tone} colour={colors[tone]} />
      <Text variant="strong" color={tone}>
        {label ?? WORDS[tone]}
      </Text>
    </View>
  );
}

function MarkShape({ tone, colour }: { tone: MarkTone; colour: string }) {
  return (
    <Svg width={14} height={14} viewBox="0 0 14 14" style={{ flexShrink: 0 }} aria-hidden>
      {tone === 'stop' ? <Rect x={1} y={1} width={12} height={12} fill={colour} /> : null}
      {tone === 'weigh' ? <Path d="M7 0.5 L13.5 13 L0.5 13 Z" fill={colour} /> : null}
      {tone === 'note' ? <Circle cx={7} cy={7} r={5.5} fill="none" stroke={colour} strokeWidth={2} /> : null}
      {tone === 'fair' ? (
        <Path d="M1.5 7.5 L5.5 11.5 L12.5 3" fill="none" stroke={colour} strokeWidth={2.4} />
      ) : null}
    </Svg>
  );
}

/** A small boxed word: demo, draft, retired. */
export function Tag({
  label,
  color = 'ink2',
}: {
  label: string;
  color?: 'ink2' | 'sea' | 'rust' | 'stop' | 'fair';
}) {
  const { colors } = useTheme();
  return (
    <View style={{ borderWidth: 1, borderColor: colors[color], borderRadius: 3, paddingHorizontal: 6 }}>
      <Text variant="small" color={color}>
        {label}
      </Text>
    </View>
  );
}
