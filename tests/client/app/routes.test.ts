import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

const FOLDER = join(__dirname, '../../../app');
const files = readdirSync(FOLDER, { recursive: true, encoding: 'utf8' }).filter((name) =>
  /\.\w+$/.test(name),
);

// Whatever lies in app/ becomes a public address.
describe.each(files)('the route %s', (name) => {
  const text = readFileSync(join(FOLDER, name), 'utf8');

  it('has a default export, and no more than ten lines', () => {
    expect(name).toMatch(/\.tsx$/);
    expect(text).toMatch(/\bdefault\b/);
    expect(text.trimEnd().split('\n').length).toBeLessThanOrEqual(10);
  });
});

it('finds the routes', () => {
  expect(files).toEqual(expect.arrayContaining(['_layout.tsx', 'sign-in.tsx', '(app)/home.tsx']));
});
