import { readFileSync } from 'node:fs';
import path from 'node:path';
import { FORMULA_VERSION, formulaFacts, formulaIds, markMeanings } from '@/formulas';
import type { FormulaId } from '@/formulas';

const fileOf: Record<FormulaId, string> = {
  srkt: 'srkt',
  t2: 't2',
  holladay1: 'holladay1',
  hofferQ: 'hoffer-q',
  haigis: 'haigis',
};

/** The first comment of the file as one line of text. */
function docblockOf(formula: FormulaId): string {
  const file = path.join(__dirname, '../../formulas/third-generation', `${fileOf[formula]}.ts`);
  const [, block = ''] = /^\/\*\*([\s\S]*?)\*\//.exec(readFileSync(file, 'utf8')) ?? [];
  return block.replace(/\n \*/g, ' ').replace(/\s+/g, ' ').trim();
}

describe.each(formulaIds)('facts of %s', (formula) => {
  const facts = formulaFacts[formula];
  const docblock = docblockOf(formula);

  it('belong to the formula', () => {
    expect(facts.id).toBe(formula);
    expect(docblock.startsWith(`${facts.name} — `)).toBe(true);
  });

  it('name the source that the docblock names', () => {
    const citation = facts.sources[0]?.citation ?? '';
    expect(citation.length).toBeGreaterThan(20);
    const sourceLine = docblock.slice(docblock.indexOf('Source: '), docblock.indexOf('Erratum / variant: '));
    expect(sourceLine).toContain(citation);
    expect(sourceLine).toContain(String(facts.year));
  });

  it('carry the marks that the docblock carries', () => {
    for (const { mark } of facts.equations) {
      expect(markMeanings[mark]).toBeDefined();
      expect(docblock).toMatch(new RegExp(`\\[${mark}\\b`));
    }
  });

  it.each(['Inputs: ', 'Result: ', 'Outside the valid range: ', 'Source: ', 'Erratum / variant: '])(
    'stand beside a docblock with its part "%s"',
    (part) => expect(docblock).toContain(part),
  );

  it('warn wherever every equation is from memory, and only there', () => {
    const isFromMemory = facts.equations.every(({ mark }) => mark === 'M');

    expect(facts.caution).toBe(isFromMemory ? 'Equations from memory, not yet checked against print.' : null);
    expect(facts.notKnown.length).toBeGreaterThan(0);
  });
});

it('warns of Hoffer Q, Haigis and T2', () => {
  expect(formulaIds.filter((formula) => formulaFacts[formula].caution !== null)).toEqual([
    't2',
    'hofferQ',
    'haigis',
  ]);
});

it('has a semantic version', () => expect(FORMULA_VERSION).toMatch(/^\d+\.\d+\.\d+$/));
