import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** A folder of its own, and the way to remove it. */
export function temporaryFolder(): { path: string; remove(): void } {
  const path = mkdtempSync(join(tmpdir(), 'landfall-test-'));
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}
