/** Actions. One primary per screen; dangerous ones are named in full and outlined in the stop colour. */
import { ActivityIndicator, Pressable, View } from 'react-native';
import type { ViewStyle } from 'react-native';
import type { Ref } from 'react';
import { useTheme } from '@/shared/client/theme/theme-context';
import { useReducedMotion } from '@/shared/client/theme/use-reduced-motion';
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

export function Button({
  label,
  onPress,
  kind = 'quiet',
  isBusy = false,
  isDisabled = false,
  accessibleLabel,
  isExpanded,
  isPressed,
  isWide,
  ref,
}: ButtonProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const tone = TONES[kind];
  return (
    <Pressable
      ref={ref}
      role="button"
      aria-label={accessibleLabel}
      aria-busy={isBusy || undefined}
      aria-expanded={isExpanded}
      {...(isPressed === undefined ? {} : { 'aria-pressed': isPressed })}
      // A busy button keeps the focus, which a disabled one would drop; it just does not act twice.
      disabled={isDisabled}
      onPress={isBusy ? undefined : onPress}
      onFocus={ring.onFocus}
      onBlur={ring.onBlur}
      style={({ pressed }) => [
        frameStyle(kind, colors),
        stateStyle({ isDisabled, pressed, isWide }),
        ring.style,
      ]}
    >
      <View style={{ flexDirection: 'row', gap: SPACE.s, alignItems: 'center' }}>
        {isBusy ? <BusySign colour={colors[tone.text]} /> : null}
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

function frameStyle(kind: ButtonKind, colors: Colours): ViewStyle {
  const { border, fill } = TONES[kind];
  return {
    minHeight: TOUCH_PX,
    paddingHorizontal: kind === 'plain' ? SPACE.s : SPACE.l,
    paddingVertical: SPACE.s,
    borderRadius: RADIUS,
    borderWidth: border ? 1 : 0,
    borderColor: border ? colors[border] : undefined,
    backgroundColor: fill ? colors[fill] : 'transparent',
    alignItems: 'center',
    justifyContent: 'center',
  };
}

function stateStyle(state: { isDisabled: boolean; pressed: boolean; isWide?: boolean }): ViewStyle {
  return {
    opacity: state.isDisabled ? 0.55 : state.pressed ? 0.8 : 1,
    alignSelf: state.isWide ? 'stretch' : 'flex-start',
  };
}

/** Turning only for those who do not mind movement. */
function BusySign({ colour }: { colour: string }) {
  const isStill = useReducedMotion();
  return <ActivityIndicator size="small" color={colour} animating={!isStill} hidesWhenStopped={false} />;
}
