import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { methodMarkMeanings, personalisationFacts, solverFacts, statisticsFacts } from '@/formulas';

const root = path.join(__dirname, '../../formulas');
const allFacts = [...solverFacts, ...statisticsFacts, ...personalisationFacts];
/** No method of their own: types, errors, checks, and the facts themselves. */
const withoutFacts = [
  'solvers/diverged-error',
  'statistics/checks',
  'statistics/errors',
  'personalisation/errors',
  'personalisation/origin',
  'personalisation/personal-constant',
  'personalisation/usable-cases',
];

/** The first comment of the file as one line of text. */
function docblockOf(id: string): string {
  const [, block = ''] =
    /^\/\*\*([\s\S]*?)\*\//.exec(readFileSync(path.join(root, `${id}.ts`), 'utf8')) ?? [];
  return block.replace(/\n \*/g, ' ').replace(/\s+/g, ' ').trim();
}

it('there are facts of every method, once', () => {
  const files = ['solvers', 'statistics', 'personalisation'].flatMap((folder) =>
    readdirSync(path.join(root, folder)).map((file) => `${folder}/${file.replace(/\.ts$/, '')}`),
  );
  const methods = files.filter((id) => !withoutFacts.includes(id) && !/\/facts/.test(id));

  expect(allFacts.map(({ id }) => id).sort()).toEqual(methods.sort());
});

describe.each(allFacts)('facts of $id', (facts) => {
  const docblock = docblockOf(facts.id);
  const sourceLine = docblock.slice(docblock.indexOf('Source: '), docblock.indexOf('Erratum / variant: '));

  it('stand beside a docblock of the same name with all its parts', () => {
    expect(docblock.startsWith(`${facts.name} — `)).toBe(true);
    for (const part of [
      'Inputs: ',
      'Result: ',
      'Outside the valid range: ',
      'Source: ',
      'Erratum / variant: ',
    ]) {
      expect(docblock).toContain(part);
    }
  });

  it('name the source that the docblock names', () => {
    expect(sourceLine).toContain(facts.sources[0]?.citation);
  });

  it('say what was checked, with marks that have a meaning', () => {
    for (const { mark } of [...facts.equations, ...facts.sources]) {
      expect(methodMarkMeanings[mark].length).toBeGreaterThan(10);
    }
    expect(facts.equations.length).toBeGreaterThan(0);
    expect(facts.checks.length).toBeGreaterThan(0);
    expect(facts.validRange.length).toBeGreaterThan(5);
  });
});
