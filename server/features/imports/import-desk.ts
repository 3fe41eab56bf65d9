/** What the process remembers of imports: how far running work is, and the rows of the files looked at last. */
import type { ImportRow } from '@/shared/contract';
import type { Deps } from '@/server/deps';
import type { Progress } from './read-rows';

const FILES_REMEMBERED = 3;

export class ImportDesk {
  private readonly progress = new Map<string, Progress>();
  private readonly rows = new Map<string, Promise<ImportRow[]>>();

  noteProgress(importId: string, progress: Progress): void {
    this.progress.set(importId, progress);
  }

  progressOf(importId: string): Progress | undefined {
    return this.progress.get(importId);
  }

  /** The work is over, well or badly. */
  forgetProgress(importId: string): void {
    this.progress.delete(importId);
  }

  keepRows(importId: string, rows: Promise<ImportRow[]>): void {
    this.rows.delete(importId);
    this.rows.set(importId, rows);
    for (const oldest of this.rows.keys()) {
      if (this.rows.size <= FILES_REMEMBERED) break;
      this.rows.delete(oldest);
    }
  }

  forgetRows(importId: string): void {
    this.rows.delete(importId);
  }

  /** The rows kept, or those that `find` gives; asked for twice at once, they are found once. */
  rowsOf(importId: string, find: () => Promise<ImportRow[]>): Promise<ImportRow[]> {
    const rows = this.rows.get(importId) ?? find();
    this.keepRows(importId, rows);
    rows.catch(() => this.rows.delete(importId));
    return rows;
  }
}

/** One desk per running service. */
export function importDeskOf(deps: Deps): ImportDesk {
  const known = desks.get(deps);
  if (known) return known;
  const desk = new ImportDesk();
  desks.set(deps, desk);
  return desk;
}

const desks = new WeakMap<Deps, ImportDesk>();
