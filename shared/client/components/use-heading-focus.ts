/** After a link the focus falls to the page; it belongs to the heading of the screen that was reached. */
import { useCallback, useRef } from 'react';
import type { RefObject } from 'react';
import type { Text } from 'react-native';
import { useFocusEffect } from 'expo-router';

export function useHeadingFocus(): RefObject<Text | null> {
  const heading = useRef<Text>(null);
  useFocusEffect(
    useCallback(() => {
      heading.current?.focus();
    }, []),
  );
  return heading;
}
