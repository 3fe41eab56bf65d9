/** The browser's own date control: keyboard, locale and calendar come with it. The value is an ISO date. */
import { createElement, useRef } from 'react';
import { FieldFrame } from './field';
import { useFocusRing } from './focus-ring';
import type { DateFieldProps } from './date-field-props';
import { useTheme } from '@/shared/client/theme/theme-context';
import { FONT, RADIUS, SIZE, SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';

export function DateField(props: DateFieldProps) {
  const { colors, isNight } = useTheme();
  const ring = useFocusRing();
  const element = useRef<HTMLInputElement>(null);
  return (
    <FieldFrame
      label={props.label}
      hint={props.hint}
      error={props.error}
      isRequired={props.isRequired}
      onPressLabel={() => element.current?.focus()}
    >
      {(ids) =>
        createElement('input', {
          ref: element,
          type: 'date',
          value: props.value,
          min: props.min,
          max: props.max,
          'aria-labelledby': ids.labelledBy,
          'aria-describedby': ids.describedBy,
          'aria-invalid': props.error ? true : undefined,
          'aria-required': props.isRequired || undefined,
          onChange: (event: { target: { value: string } }) => props.onChange(event.target.value),
          onFocus: ring.onFocus,
          onBlur: () => {
            ring.onBlur();
            props.onBlur?.();
          },
          style: {
            minHeight: TOUCH_PX,
            boxSizing: 'border-box',
            width: '100%',
            border: `${props.error ? 2 : 1}px solid ${props.error ? colors.stop : colors.line}`,
            borderRadius: RADIUS,
            background: colors.surface,
            color: colors.ink,
            colorScheme: isNight ? 'dark' : 'light',
            padding: `${SPACE.s}px ${SPACE.m}px`,
            fontSize: SIZE.large,
            fontFamily: FONT.numbers,
            outline: ring.isFocused ? `3px solid ${colors.sea}` : 'none',
            outlineOffset: 2,
          },
        })
      }
    </FieldFrame>
  );
}
