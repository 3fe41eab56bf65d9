import { currentPath, safeNextPath } from '@/shared/client/lib/next-path';

describe('where sign-in leads back to', () => {
  it('keeps an address of this site with its query', () => {
    expect(safeNextPath('/patients/7/right?plan=2')).toBe('/patients/7/right?plan=2');
  });

  it.each([
    ['another site', 'https://elsewhere.example/'],
    ['another site without its scheme', '//elsewhere.example/'],
    ['another site behind a backslash', '/\\elsewhere.example/'],
    ['a script', 'javascript:alert(1)'],
    ['a bare word', 'patients'],
    ['the sign-in page itself', '/sign-in?next=/sign-in'],
    ['a tab, which browsers drop from addresses', '/\t/elsewhere.example'],
    ['nothing', undefined],
    ['an empty text', ''],
  ])('leads home instead of to %s', (_what, next) => {
    expect(safeNextPath(next)).toBe('/home');
  });

  it('takes the first of several', () => {
    expect(safeNextPath(['/plans', '//elsewhere.example'])).toBe('/plans');
  });

  it('reads the address bar with its query', () => {
    globalThis.history.pushState({}, '', '/patients/7?side=left');
    expect(currentPath()).toBe('/patients/7?side=left');
  });
});
