/** The visible keyboard focus, the same on everything that can hold it. */
import { useState } from 'react';
import { useTheme } from '@/shared/client/theme/theme-context';

interface RingStyle {
  outlineColor?: string;
  outlineStyle?: 'solid';
  outlineWidth: number;
  outlineOffset?: number;
}

export function useFocusRing(): {
  style: RingStyle;
  onFocus: () => void;
  onBlur: () => void;
  isFocused: boolean;
} {
  const { colors } = useTheme();
  const [isFocused, setIsFocused] = useState(false);
  const style: RingStyle = isFocused
    ? { outlineColor: colors.sea, outlineStyle: 'solid', outlineWidth: 3, outlineOffset: 2 }
    : { outlineWidth: 0 };
  return { style, isFocused, onFocus: () => setIsFocused(true), onBlur: () => setIsFocused(false) };
}
