import { createThrottle } from '@/server/http/throttle';
import { fakeClock, MINUTE } from '@/tests/support/fake-clock';

describe('throttle', () => {
  it('lets five attempts through and says how long to wait', () => {
    const clock = fakeClock();
    const throttle = createThrottle(clock);

    const left = [1, 2, 3, 4, 5].map(() => throttle.attempt('a'));
    clock.advance(5 * MINUTE);

    expect(left).toEqual([4, 3, 2, 1, 0]);
    expect(() => throttle.attempt('a')).toThrow(
      expect.objectContaining({ code: 'too-many-requests', extras: { retryAfterS: 600 } }),
    );
    expect(throttle.attempt('b')).toBe(4);
  });

  it('opens again after the window, which later attempts do not stretch', () => {
    const clock = fakeClock();
    const throttle = createThrottle(clock);
    for (let attempt = 0; attempt < 5; attempt += 1) throttle.attempt('a');

    clock.advance(14 * MINUTE);
    expect(() => throttle.attempt('a')).toThrow();
    clock.advance(MINUTE);

    expect(throttle.attempt('a')).toBe(4);
  });

  it('forgets failures after a success', () => {
    const throttle = createThrottle(fakeClock());
    for (let attempt = 0; attempt < 5; attempt += 1) throttle.attempt('a');

    throttle.reset('a');

    expect(throttle.attempt('a')).toBe(4);
  });
});
