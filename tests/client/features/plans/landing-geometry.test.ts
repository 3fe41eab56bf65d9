import { hillPath, isOnAxis, refractionScale } from '@/shared/client/features/plans/landing-geometry';
import type { Candidate } from '@/shared/contract';

const candidate = (powerD: number, meanD: number, sdD = 0.45): Candidate => ({
  powerD,
  predictions: [],
  lowestD: meanD - 0.2,
  highestD: meanD + 0.2,
  landing: { meanD, sdD, chance: 0.7 },
  isClosest: false,
});

describe('the axis of the landing chart', () => {
  const scale = refractionScale([candidate(22, -0.6), candidate(21, 0.1)], -0.25, 300);

  it('puts more nearsighted refractions further left', () => {
    expect(scale.x(-1)).toBeLessThan(scale.x(0));
  });

  it('spans every hill to two standard deviations, in half dioptres', () => {
    expect(scale.minD).toBe(-1.5);
    expect(scale.maxD).toBe(1);
    expect(scale.x(scale.minD)).toBe(0);
    expect(scale.x(scale.maxD)).toBe(300);
  });

  it('never reaches further than three dioptres from the target', () => {
    const wide = refractionScale([candidate(30, -9), candidate(10, 8)], 0, 300);

    expect([wide.minD, wide.maxD]).toEqual([-3, 3]);
    expect(isOnAxis(wide, -9)).toBe(false);
    expect(isOnAxis(wide, 2.9)).toBe(true);
  });

  it('labels whole dioptres when half ones would crowd', () => {
    expect(refractionScale([candidate(22, 0, 1.2)], 0, 200).ticksD).toEqual([-2, -1, 0, 1, 2]);
  });
});

describe('the hill of a candidate', () => {
  const scale = refractionScale([candidate(22, 0)], 0, 400);
  const box = { baselinePx: 40, heightPx: 36, narrowestSdD: 0.45 };
  const topOf = (path: string) =>
    Math.min(...[...path.matchAll(/-?[\d.]+,(-?[\d.]+)/g)].map((m) => Number(m[1])));

  it('is as high as the box for the narrowest spread and lower for a wider one', () => {
    const narrow = topOf(hillPath({ meanD: 0, sdD: 0.45 }, scale, box));
    const wide = topOf(hillPath({ meanD: 0, sdD: 0.9 }, scale, box));

    expect(narrow).toBeCloseTo(4, 0);
    expect(wide).toBeCloseTo(22, 0);
  });

  it('is empty when the landing lies off the axis', () => {
    expect(hillPath({ meanD: 9, sdD: 0.3 }, scale, box)).toBe('');
  });
});
