import type { Home } from '@/shared/contract';
import { listReady } from './import.repository';

/** For the technician: files that were checked and neither stored nor discarded. */
export async function readyImportsSection(): Promise<Home['sections'][number]> {
  const ready = await listReady();
  return {
    id: 'ready-imports',
    title: 'Files checked and not stored yet',
    emptyHint: 'Every uploaded file is stored or discarded. Upload biometry under Imports.',
    total: ready.length,
    items: ready.slice(0, SHOWN).map(({ id, fileName, counts, uploadedBy }) => ({
      title: fileName,
      detail: `${counts.created} to create, ${counts.refused} refused; uploaded by ${uploadedBy}`,
      href: `/imports/${id}`,
      side: null,
    })),
  };
}

const SHOWN = 10;
