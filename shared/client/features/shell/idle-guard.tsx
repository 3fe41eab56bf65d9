/** Ends the session after a quarter of an hour without any act, with a minute's warning. */
import { useEffect, useRef, useState } from 'react';
import { IDLE_MINUTES, signOut } from '@/shared/client/api/session';
import { refreshSession } from '@/shared/client/api/client';
import { Button } from '@/shared/client/components/button';
import { Dialog } from '@/shared/client/components/dialog';
import { Text } from '@/shared/client/components/text';

const MINUTE_MS = 60_000;
const ACTS = ['pointerdown', 'keydown', 'scroll', 'touchstart'] as const;

export function IdleGuard() {
  const lastActMs = useRef(Date.now());
  const renewedMs = useRef(Date.now());
  const [isWarning, setIsWarning] = useState(false);

  useEffect(() => {
    const onAct = () => {
      lastActMs.current = Date.now();
      // Somebody who reads and scrolls calls nothing; the server must learn that they are there.
      if (Date.now() - renewedMs.current > 5 * MINUTE_MS) {
        renewedMs.current = Date.now();
        refreshSession().catch(() => undefined);
      }
    };
    const check = setInterval(() => {
      const quietMs = Date.now() - lastActMs.current;
      if (quietMs >= IDLE_MINUTES * MINUTE_MS) void signOut(true);
      else setIsWarning(quietMs >= (IDLE_MINUTES - 1) * MINUTE_MS);
    }, 5_000);
    ACTS.forEach((act) => globalThis.addEventListener?.(act, onAct, { passive: true, capture: true }));
    return () => {
      clearInterval(check);
      ACTS.forEach((act) => globalThis.removeEventListener?.(act, onAct, { capture: true }));
    };
  }, []);

  const stay = () => {
    lastActMs.current = Date.now();
    setIsWarning(false);
    refreshSession().catch(() => undefined);
  };
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
