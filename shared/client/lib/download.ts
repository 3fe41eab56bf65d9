/** Hands a fetched file to the browser to keep. */
import { callFile } from '@/shared/client/api/client';

export async function downloadFile(path: string): Promise<void> {
  const { blob, fileName } = await callFile(path);
  const address = URL.createObjectURL(blob);
  const anchor = document.createElement('a');
  anchor.href = address;
  anchor.download = fileName;
  anchor.click();
  // The browser has taken its copy by the next turn; a minute is generous for slow machines.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
