/** The browser's own select: one of many, with typing ahead and the phone's own wheel. */
import { createElement, useRef } from 'react';
import { FieldFrame } from './field';
import { useFocusRing } from './focus-ring';
import type { SelectProps } from './select-props';
import { useTheme } from '@/shared/client/theme/theme-context';
import { FONT, RADIUS, SIZE, SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';

export function Select<T extends string>(props: SelectProps<T>) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const element = useRef<HTMLSelectElement>(null);
  return (
    <FieldFrame
      label={props.label}
      hint={props.hint}
      error={props.error}
      isRequired={props.isRequired ?? true}
      onPressLabel={() => element.current?.focus()}
    >
      {(ids) =>
        createElement(
          'select',
          {
            ref: element,
            value: props.value,
            disabled: props.isDisabled,
            'aria-labelledby': ids.labelledBy,
            'aria-describedby': ids.describedBy,
            onChange: (event: { target: { value: string } }) => props.onChange(event.target.value as T),
            onFocus: ring.onFocus,
            onBlur: ring.onBlur,
            style: {
              minHeight: TOUCH_PX,
              width: '100%',
              boxSizing: 'border-box',
              border: `1px solid ${colors.line}`,
              borderRadius: RADIUS,
              background: colors.surface,
              color: colors.ink,
              padding: `${SPACE.s}px ${SPACE.m}px`,
              fontSize: SIZE.body,
              fontFamily: FONT.words,
              outline: ring.isFocused ? `3px solid ${colors.sea}` : 'none',
              outlineOffset: 2,
            },
          },
          props.options.map((option) =>
            createElement('option', { key: option.value, value: option.value }, option.label),
          ),
        )
      }
    </FieldFrame>
  );
}
