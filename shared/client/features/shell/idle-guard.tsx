/** Ends the session after a quarter of an hour without any act in any tab, with a minute's warning. */
import { useEffect, useState } from 'react';
import { IDLE_MINUTES, signOut } from '@/shared/client/api/session';
import { refreshSession } from '@/shared/client/api/refresh';
import { Button } from '@/shared/client/components/button';
import { Dialog } from '@/shared/client/components/dialog';
import { Text } from '@/shared/client/components/text';
import { createIdleClock } from '@/shared/client/lib/idle';

const MINUTE_MS = 60_000;
const RENEW_EVERY_MS = 5 * MINUTE_MS;
const LOOK_EVERY_MS = 5_000;
const ACTS = ['pointerdown', 'keydown', 'scroll', 'touchstart'] as const;

export function IdleGuard() {
  const [isWarning, setIsWarning] = useState(false);

  useEffect(() => {
    const clock = createIdleClock(IDLE_MINUTES * MINUTE_MS);
    const renew = createRenewal();
    const look = () => {
      const state = clock.state();
      if (state === 'over') void signOut('idle');
      setIsWarning(state === 'warning');
      return state;
    };
    const onAct = () => {
      // A computer that slept wakes with an act: the time it slept counts as quiet.
      if (look() === 'over') return;
      // The question stays open until the next look: closed now, it would take its own button from under the press.
      clock.act();
      renew();
    };
    const looking = setInterval(look, LOOK_EVERY_MS);
    ACTS.forEach((act) => globalThis.addEventListener(act, onAct, { passive: true, capture: true }));
    return () => {
      clearInterval(looking);
      ACTS.forEach((act) => globalThis.removeEventListener(act, onAct, { capture: true }));
    };
  }, []);

  // Pressing the button was an act already: the clock and the server know.
  const stay = () => setIsWarning(false);
  return (
    <Dialog
      title="Still there?"
      isOpen={isWarning}
      onClose={stay}
      cancelLabel="Stay signed in"
      actions={<Button label="Sign out" onPress={() => void signOut()} />}
    >
      <Text>
        You will be signed out in a minute. What you were typing is kept on this computer for your next
        sign-in.
      </Text>
    </Dialog>
  );
}

/** Somebody who reads and scrolls calls nothing; the server must learn that they are there. */
function createRenewal(): () => void {
  let renewedMs = Date.now();
  return () => {
    if (Date.now() - renewedMs < RENEW_EVERY_MS) return;
    renewedMs = Date.now();
    refreshSession().catch(() => undefined);
  };
}
