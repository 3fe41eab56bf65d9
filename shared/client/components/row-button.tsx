/** A row that is chosen as a whole. Arrow keys move to its neighbours, Enter and Space choose it. */
import type { ReactNode } from 'react';
import { Pressable } from 'react-native';
import type { View } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';

/** What stands left of the content: a picture above the rows begins there too. */
const EDGE = { borderPx: 4, paddingPx: SPACE.s };
export const ROW_EDGE_PX = EDGE.borderPx + EDGE.paddingPx;

interface RowButtonProps {
  label: string;
  isPressed: boolean;
  isTabStop: boolean;
  isDisabled: boolean;
  onPress: () => void;
  onStep: (step: 1 | -1) => void;
  setElement: (element: View | null) => void;
  children: ReactNode;
}

export function RowButton({
  label,
  isPressed,
  isTabStop,
  isDisabled,
  onPress,
  onStep,
  setElement,
  children,
}: RowButtonProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const onKeyDown = (event: { key: string; preventDefault: () => void }) => {
    const step = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : undefined;
    if (step === undefined) return;
    event.preventDefault();
    onStep(step);
  };
  return (
    <Pressable
      ref={setElement}
      role="button"
      aria-label={label}
      {...({ 'aria-pressed': isPressed, onKeyDown, tabIndex: isTabStop ? 0 : -1 } as object)}
      disabled={isDisabled}
      onPress={onPress}
      onFocus={ring.onFocus}
      onBlur={ring.onBlur}
      style={[
        {
          minHeight: TOUCH_PX,
          borderBottomWidth: 1,
          borderBottomColor: colors.hairline,
          borderLeftWidth: EDGE.borderPx,
          borderLeftColor: isPressed ? colors.sea : 'transparent',
          paddingLeft: EDGE.paddingPx,
          justifyContent: 'center',
        },
        { ...ring.style, outlineOffset: -3 },
      ]}
    >
      {children}
    </Pressable>
  );
}
