/** Ties the draft store to an open form: what was typed comes back, and is kept while typing goes on. */
import { useCallback, useEffect, useState } from 'react';
import type { FieldValues, UseFormReturn } from 'react-hook-form';
import { useUser } from '@/shared/client/api/session-store';
import { readDraft, removeDraft, writeDraft } from './drafts';

const REST_MS = 300;

export interface FormDraft {
  /** True when the form shows what was typed earlier: say so, and offer to start anew. */
  isRestored: boolean;
  /** Forgets the draft: after saving. */
  remove: () => void;
  /** Forgets the draft and shows the form as it began. */
  startAnew: () => void;
}

/**
 * `name` tells what is typed and about whom: `measurement/<patientId>/right`. Values are text as typed; fields
 * that the form no longer has are left out. Never for passwords.
 */
export function useFormDraft<I extends FieldValues, O>(
  form: UseFormReturn<I, unknown, O>,
  name: string,
): FormDraft {
  const userId = useUser().id;
  const { reset, getValues, subscribe } = form;
  const [isRestored, setIsRestored] = useState(() => readDraft(userId, name) !== undefined);
  const [keeper] = useState(createKeeper);

  useEffect(() => {
    const draft = readDraft<Partial<I>>(userId, name);
    if (!draft) return;
    const initial = getValues();
    const known = Object.entries(draft).filter(([field]) => field in initial);
    reset({ ...initial, ...Object.fromEntries(known) } as I, { keepDefaultValues: true });
  }, [userId, name, getValues, reset]);

  useEffect(() => {
    keeper.onKeep((values) => writeDraft(userId, name, values));
    const unsubscribe = subscribe({
      formState: { values: true, isDirty: true },
      callback: ({ values, isDirty }) => {
        if (isDirty) keeper.later(values);
      },
    });
    // A reload or a closed tab does not wait for the rest.
    globalThis.addEventListener('pagehide', keeper.now);
    return () => {
      unsubscribe();
      globalThis.removeEventListener('pagehide', keeper.now);
      keeper.now();
    };
  }, [userId, name, subscribe, keeper]);

  const remove = useCallback(() => {
    keeper.forget();
    removeDraft(userId, name);
    setIsRestored(false);
  }, [userId, name, keeper]);
  const startAnew = useCallback(() => {
    reset();
    remove();
  }, [remove, reset]);
  return { isRestored, remove, startAnew };
}

/** Waits for a rest in typing before it keeps the latest values. */
function createKeeper() {
  let keep: (values: unknown) => void = () => undefined;
  let pending: ReturnType<typeof setTimeout> | undefined;
  let latest: { values: unknown } | undefined;
  const forget = () => {
    clearTimeout(pending);
    latest = undefined;
  };
  const now = () => {
    if (latest) keep(latest.values);
    forget();
  };
  const later = (values: unknown) => {
    clearTimeout(pending);
    latest = { values };
    pending = setTimeout(now, REST_MS);
  };
  return { onKeep: (next: typeof keep) => (keep = next), later, now, forget };
}
