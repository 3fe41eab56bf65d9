import * as fc from 'fast-check';
import {
  formatAxis,
  formatBytes,
  formatChance,
  formatCount,
  formatDate,
  formatDecimals,
  formatDioptres,
  formatInstant,
  formatKeratometry,
  formatMm,
  formatPower,
  formatWhole,
  MISSING,
  sideWords,
} from '@/shared/client/lib/format';

describe('dioptres', () => {
  it.each([
    [0.25, '+0.25'],
    [-1.5, '−1.50'],
    [0, '0.00'],
    [-0.004, '0.00'],
    [-0.005000001, '−0.01'],
    [12, '+12.00'],
  ])('writes %p as %p', (value, text) => {
    expect(formatDioptres(value)).toBe(text);
  });

  it('uses the true minus sign, never the hyphen', () => {
    fc.assert(
      fc.property(fc.double({ min: -40, max: 40, noNaN: true }), (value) => {
        expect(formatDioptres(value)).toMatch(/^[+−]?\d+\.\d{2}$/);
      }),
    );
  });

  it('reads back to within half the last digit', () => {
    fc.assert(
      fc.property(fc.double({ min: -40, max: 40, noNaN: true }), (value) => {
        const back = Number(formatDioptres(value).replace('−', '-'));
        expect(Math.abs(back - value)).toBeLessThanOrEqual(0.005 + 1e-9);
      }),
    );
  });
});

describe('lens powers', () => {
  it.each([
    [21.5, 0.5, '+21.5'],
    [21, 1, '+21.0'],
    [-3, 1, '−3.0'],
    [20.25, 0.25, '+20.25'],
    [20.5, 0.25, '+20.50'],
  ])('writes %p in steps of %p as %p', (power, step, text) => {
    expect(formatPower(power, step)).toBe(text);
  });
});

describe('lengths, keratometry, whole numbers', () => {
  it('gives two decimals, no sign, no unit', () => {
    expect(formatMm(23.456)).toBe('23.46');
    expect(formatKeratometry(43.5)).toBe('43.50');
    expect(formatWhole(541.6)).toBe('542');
    expect(formatDecimals(1.3375, 4)).toBe('1.3375');
  });
});

describe('axes', () => {
  it.each([
    [1, '1°'],
    [180, '180°'],
    [0, '180°'],
    [0.4, '180°'],
    [179.6, '180°'],
    [181, '1°'],
    [-5, '175°'],
  ])('writes %p as %p', (axis, text) => {
    expect(formatAxis(axis)).toBe(text);
  });
});

describe('the chance of landing', () => {
  it.each([
    [0.724, '72 %'],
    [0.995, '>99 %'],
    [0.004, '<1 %'],
    [1, '100 %'],
    [0, '0 %'],
  ])('writes %p as %p', (chance, text) => {
    expect(formatChance(chance)).toBe(text);
  });
});

describe('a missing number', () => {
  const writers = { formatDioptres, formatPower, formatMm, formatWhole, formatAxis, formatChance };
  it.each(Object.entries(writers))('%s shows a dash, never 0', (_name, write) => {
    for (const missing of [null, undefined, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(write(missing)).toBe(MISSING);
    }
  });
});

describe('dates', () => {
  it('writes the month as a word and keeps the calendar date', () => {
    expect(formatDate('2026-12-01')).toBe('01 Dec 2026');
    expect(formatDate('1950-01-31')).toBe('31 Jan 1950');
  });

  it('shows a dash for what is not a date', () => {
    expect(formatDate('')).toBe(MISSING);
    expect(formatDate(null)).toBe(MISSING);
    expect(formatDate('2026-13-01')).toBe(MISSING);
    expect(formatInstant('yesterday')).toBe(MISSING);
  });

  it('writes a moment in the time of the reader', () => {
    const local = new Date(2026, 10, 30, 7, 5);
    expect(formatInstant(local.toISOString())).toBe('30 Nov 2026, 07:05');
  });
});

it('counts and weighs in words', () => {
  expect(formatCount(1, 'eye')).toBe('1 eye');
  expect(formatCount(1234, 'eye')).toBe('1,234 eyes');
  expect(formatCount(2, 'entry', 'entries')).toBe('2 entries');
  expect(formatBytes(512)).toBe('512 B');
  expect(formatBytes(2_500_000)).toBe('2.4 MB');
});

it('spells out the side', () => {
  expect(sideWords('right')).toBe('Right eye');
  expect(sideWords('left')).toBe('Left eye');
});
