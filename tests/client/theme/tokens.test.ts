import { DAY, NIGHT, SIZE, TOUCH_PX } from '@/shared/client/theme/tokens';
import type { Colours } from '@/shared/client/theme/tokens';

/** WCAG 2.2: relative luminance of an sRGB colour written #RRGGBB. */
function luminance(hex: string): number {
  const linear = [1, 3, 5].map((start) => {
    const share = parseInt(hex.slice(start, start + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  const [red = 0, green = 0, blue = 0] = linear;
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (light + 0.05) / (dark + 0.05);
}

const TEXT: (keyof Colours)[] = ['ink', 'ink2', 'sea', 'rust', 'stop', 'weigh', 'note', 'fair'];
const GROUNDS: (keyof Colours)[] = ['paper', 'surface'];
const PALETTES = [
  { name: 'day', palette: DAY },
  { name: 'night', palette: NIGHT },
];

describe('the contrast formula', () => {
  it('knows black on white and a grey whose ratio is published', () => {
    expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 5);
    expect(contrast('#767676', '#FFFFFF')).toBeCloseTo(4.54, 2);
  });
});

describe.each(PALETTES)('colours by $name', ({ palette }) => {
  const pairs = TEXT.flatMap((text) => GROUNDS.map((ground) => ({ text, ground })));

  it.each(pairs)('lets $text be read on $ground', ({ text, ground }) => {
    expect(contrast(palette[text], palette[ground])).toBeGreaterThanOrEqual(4.5);
  });

  it.each(GROUNDS)('shows field borders on %s', (ground) => {
    expect(contrast(palette.line, palette[ground])).toBeGreaterThanOrEqual(3);
  });

  it('lets the words on a filled button and on the demo banner be read', () => {
    expect(contrast(palette.onSea, palette.sea)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(palette.surface, palette.rust)).toBeGreaterThanOrEqual(4.5);
  });

  it('writes every colour as six hexadecimal digits', () => {
    for (const colour of Object.values(palette)) expect(colour).toMatch(/^#[0-9A-F]{6}$/);
  });
});

it('keeps touch targets at 44 px and no type below 13 px', () => {
  expect(TOUCH_PX).toBe(44);
  expect(Math.min(...Object.values(SIZE))).toBe(13);
});
