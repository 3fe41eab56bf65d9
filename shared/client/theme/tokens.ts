/**
 * The one place for colours, sizes and distances. Screens use the names, never the values.
 */

export interface Colours {
  paper: string;
  surface: string;
  ink: string;
  ink2: string;
  line: string;
  /** Hairlines inside a card, where 3:1 is not needed because nothing depends on seeing them. */
  hairline: string;
  sea: string;
  /** Text on a sea-coloured button. */
  onSea: string;
  rust: string;
  stop: string;
  weigh: string;
  note: string;
  fair: string;
}

export const DAY: Colours = {
  paper: '#F7F3EA',
  surface: '#FFFFFF',
  ink: '#14242C',
  ink2: '#47585F',
  line: '#8C8577',
  hairline: '#DDD6C6',
  sea: '#0F5E66',
  onSea: '#FFFFFF',
  rust: '#A2481F',
  stop: '#9E1F2D',
  weigh: '#7A4F00',
  note: '#3B5B8C',
  fair: '#2E6B3A',
};

export const NIGHT: Colours = {
  paper: '#0E191F',
  surface: '#16252D',
  ink: '#E9EFEF',
  ink2: '#A9B8BC',
  line: '#6B808A',
  hairline: '#2A3C45',
  sea: '#6CC3C4',
  onSea: '#0E191F',
  rust: '#F0A277',
  stop: '#FF9AA2',
  weigh: '#F2C14E',
  note: '#9DB8E8',
  fair: '#8FD19E',
};

export const SIZE = { small: 13, body: 15, large: 17, title: 21, display: 28, huge: 40 } as const;
export const SPACE = { xs: 4, s: 8, m: 12, l: 16, xl: 24, xxl: 32, xxxl: 48 } as const;
export const RADIUS = 6;
export const TOUCH_PX = 44;
export const SHADOW = '0 1px 3px rgba(20, 36, 44, 0.14)';

export const FONT = {
  words: 'AtkinsonHyperlegible_400Regular',
  wordsBold: 'AtkinsonHyperlegible_700Bold',
  numbers: 'RobotoMono_400Regular',
  numbersBold: 'RobotoMono_600SemiBold',
} as const;

/** Window widths, px: below `tablet` a phone, from `wide` a desk. */
export const BREAKPOINT = { tablet: 600, wide: 1024 } as const;
