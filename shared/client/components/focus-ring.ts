/** The visible keyboard focus, the same on everything that can hold it. */
import { useState } from 'react';
import type { TextStyle } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';

export function useFocusRing(): {
  style: TextStyle;
  onFocus: () => void;
  onBlur: () => void;
  isFocused: boolean;
} {
  const { colors } = useTheme();
  const [isFocused, setIsFocused] = useState(false);
  const style: TextStyle = isFocused
    ? { outlineColor: colors.sea, outlineStyle: 'solid', outlineWidth: 3, outlineOffset: 2 }
    : { outlineWidth: 0 };
  return { style, isFocused, onFocus: () => setIsFocused(true), onBlur: () => setIsFocused(false) };
}
