/** Work that outlives a request: mails, long imports. Shutdown and tests wait for it. */
import type { Logger } from 'pino';

export interface Background {
  run(name: string, work: () => Promise<void>): void;
  idle(): Promise<void>;
}

export function createBackground(logger: Logger): Background {
  const running = new Set<Promise<void>>();
  return {
    run(name, work) {
      const task = work()
        .catch((error: unknown) => logger.error({ task: name, err: error }, 'background work failed'))
        .finally(() => running.delete(task));
      running.add(task);
    },
    async idle() {
      while (running.size > 0) await Promise.all(running);
    },
  };
}
