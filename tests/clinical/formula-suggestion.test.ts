import { suggestFormulas } from '@/shared/clinical/formula-suggestion';

describe('the suggested formulas', () => {
  it.each([
    [18, ['haigis', 'hofferQ']],
    [21.99, ['haigis', 'hofferQ']],
    [22, ['srkt', 'holladay1']],
    [26, ['srkt', 'holladay1']],
    [26.01, ['haigis', 'srkt']],
    [31, ['haigis', 'srkt']],
  ])('at %s mm are %j', (axialLengthMm, formulas) => {
    expect(suggestFormulas(axialLengthMm).formulas).toEqual(formulas);
  });

  it('come with source and mark at every length', () => {
    for (const axialLengthMm of [20, 24, 26.2, 29]) {
      expect(suggestFormulas(axialLengthMm)).toMatchObject({
        source: expect.stringMatching(/NICE NG77/),
        mark: 'M',
      });
    }
  });

  it('warn above 26.50 mm of the farsighted surprise, and not before', () => {
    expect(suggestFormulas(26.5).reason).not.toMatch(/Caution/);
    expect(suggestFormulas(26.51).reason).toMatch(/Caution above 26\.50 mm.*farsighted surprise/);
  });
});
