/** Actions. One primary per screen; dangerous ones are named in full and outlined in the stop colour. */
import { ActivityIndicator, Pressable, View } from 'react-native';
import type { Ref } from 'react';
import { useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import type { Colours } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';
import { Text } from './text';

export type ButtonKind = 'primary' | 'quiet' | 'danger' | 'plain';

export interface ButtonProps {
  label: string;
  onPress: () => void;
  kind?: ButtonKind;
  isBusy?: boolean;
  isDisabled?: boolean;
  /** For screen readers, when the label alone does not say what it acts on. */
  accessibleLabel?: string;
  isExpanded?: boolean;
  isPressed?: boolean;
  isWide?: boolean;
  ref?: Ref<View>;
}

const TONES: Record<
  ButtonKind,
  { fill: keyof Colours | null; text: keyof Colours; border: keyof Colours | null }
> = {
  primary: { fill: 'sea', text: 'onSea', border: 'sea' },
  quiet: { fill: 'surface', text: 'sea', border: 'sea' },
  danger: { fill: 'surface', text: 'stop', border: 'stop' },
  plain: { fill: null, text: 'sea', border: null },
};

export function Button(props: ButtonProps) {
  const { label, onPress, kind = 'quiet', isBusy = false, isDisabled = false } = props;
  const { colors } = useTheme();
  const ring = useFocusRing();
  const tone = TONES[kind];
  return (
    <Pressable
      ref={props.ref}
      role="button"
      aria-label={props.accessibleLabel}
      aria-busy={isBusy || undefined}
      aria-expanded={props.isExpanded}
      {...(props.isPressed === undefined ? {} : { 'aria-pressed': props.isPressed })}
      disabled={isDisabled || isBusy}
      onPress={onPress}
      onFocus={ring.onFocus}
      onBlur={ring.onBlur}
      style={({ pressed }) => [
        {
          minHeight: TOUCH_PX,
          paddingHorizontal: kind === 'plain' ? SPACE.s : SPACE.l,
          paddingVertical: SPACE.s,
          borderRadius: RADIUS,
          borderWidth: tone.border ? 1 : 0,
          borderColor: tone.border ? colors[tone.border] : undefined,
          backgroundColor: tone.fill ? colors[tone.fill] : 'transparent',
          opacity: isDisabled ? 0.55 : pressed ? 0.8 : 1,
          alignItems: 'center',
          justifyContent: 'center',
          alignSelf: props.isWide ? 'stretch' : 'flex-start',
        },
        ring.style,
      ]}
    >
      <View style={{ flexDirection: 'row', gap: SPACE.s, alignItems: 'center' }}>
        {isBusy ? <ActivityIndicator size="small" color={colors[tone.text]} /> : null}
        <Text
          variant="strong"
          color={tone.text}
          style={kind === 'plain' ? { textDecorationLine: 'underline' } : undefined}
        >
          {label}
        </Text>
      </View>
    </Pressable>
  );
}
