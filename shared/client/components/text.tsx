/** Words and numbers on a screen. Headings are real headings; numbers stand in tabular figures. */
import { Text as NativeText } from 'react-native';
import type { TextStyle } from 'react-native';
import type { ReactNode, Ref } from 'react';
import { useTheme } from '@/shared/client/theme/theme-context';
import { FONT, SIZE } from '@/shared/client/theme/tokens';
import type { Colours } from '@/shared/client/theme/tokens';

const VARIANTS = {
  small: { size: SIZE.small, bold: false },
  body: { size: SIZE.body, bold: false },
  strong: { size: SIZE.body, bold: true },
  large: { size: SIZE.large, bold: false },
  heading: { size: SIZE.large, bold: true },
  title: { size: SIZE.title, bold: true },
  display: { size: SIZE.display, bold: true },
  huge: { size: SIZE.huge, bold: true },
} as const;
export type TextVariant = keyof typeof VARIANTS;

export interface TextProps {
  children: ReactNode;
  variant?: TextVariant;
  color?: keyof Colours;
  /** Tabular figures, for every measured or computed number. */
  isNumber?: boolean;
  /** 1–4: makes it a heading of that level. */
  level?: 1 | 2 | 3 | 4;
  align?: 'left' | 'right' | 'center';
  id?: string;
  role?: 'alert' | 'status';
  numberOfLines?: number;
  ref?: Ref<NativeText>;
  isFocusable?: boolean;
  style?: TextStyle;
  'aria-hidden'?: boolean;
  'aria-label'?: string;
}

export function Text({
  variant = 'body',
  color = 'ink',
  isNumber,
  level,
  align,
  isFocusable,
  style,
  ...rest
}: TextProps) {
  const { colors } = useTheme();
  const { size, bold } = VARIANTS[variant];
  const family = isNumber ? (bold ? FONT.numbersBold : FONT.numbers) : bold ? FONT.wordsBold : FONT.words;
  const heading = level ? { role: 'heading' as const, 'aria-level': level } : {};
  return (
    <NativeText
      {...heading}
      {...rest}
      {...(isFocusable ? { tabIndex: -1 as const } : {})}
      style={[
        {
          color: colors[color],
          fontSize: size,
          lineHeight: Math.round(size * 1.4),
          fontFamily: family,
          textAlign: align,
        },
        isFocusable ? ({ outlineStyle: 'none' } as unknown as TextStyle) : null,
        style,
      ]}
    />
  );
}

/** A value with its unit beside it, in tabular figures; `—` stays alone. */
export function Quantity({
  value,
  unit,
  variant = 'body',
}: {
  value: string;
  unit?: string;
  variant?: TextVariant;
}) {
  return (
    <Text variant={variant} isNumber>
      {value}
      {unit && value !== '—' ? (
        <Text variant="small" color="ink2">
          {` ${unit}`}
        </Text>
      ) : null}
    </Text>
  );
}
