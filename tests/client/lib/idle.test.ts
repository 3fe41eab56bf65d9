import { createIdleClock } from '@/shared/client/lib/idle';

const MINUTE_MS = 60_000;
const LIMIT_MS = 15 * MINUTE_MS;

/** Two tabs of one browser, under one clock. */
function twoTabs() {
  let nowMs = 1_800_000_000_000;
  const now = () => nowMs;
  const wait = (ms: number) => (nowMs += ms);
  return { here: createIdleClock(LIMIT_MS, now), there: createIdleClock(LIMIT_MS, now), wait };
}

describe('quiet time', () => {
  it('warns a minute before the end, and ends', () => {
    const { here, wait } = twoTabs();

    expect(here.state()).toBe('active');
    wait(14 * MINUTE_MS - 1);
    expect(here.state()).toBe('active');
    wait(1);
    expect(here.state()).toBe('warning');
    wait(MINUTE_MS - 1);
    expect(here.state()).toBe('warning');
    wait(1);
    expect(here.state()).toBe('over');
  });

  it('starts anew with each act', () => {
    const { here, wait } = twoTabs();

    wait(14 * MINUTE_MS);
    here.act();
    wait(10 * MINUTE_MS);

    expect(here.state()).toBe('active');
  });

  it('counts over all tabs: work in one keeps another from ending the session', () => {
    const { here, there, wait } = twoTabs();

    wait(14 * MINUTE_MS);
    there.act();
    wait(13 * MINUTE_MS);

    expect(here.state()).toBe('active');
    wait(2 * MINUTE_MS);
    expect(here.state()).toBe('over');
  });

  it.each(['soon', '9999999999999', ''])('is not stretched by "%s" in the storage', (stored) => {
    const { here, wait } = twoTabs();
    wait(15 * MINUTE_MS);

    localStorage.setItem('landfall.last-act', stored);

    expect(here.state()).toBe('over');
  });
});
