import { api } from '@/lib/api';
import { saveBlob } from '@/lib/save-file.web';

/** Fetches a paper as this reader, and saves it. */
export async function savePaper(path: string, name: string): Promise<void> {
  saveBlob(name, await api.file(path));
}
