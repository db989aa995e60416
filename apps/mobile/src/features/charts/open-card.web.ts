import { api } from '@/lib/api';
import { saveBlob } from '@/lib/save-file.web';

/** Fetches the card as this reader, and saves it. */
export async function openCard(pegId: string, number: string): Promise<void> {
  const name = number.toLowerCase().replace(/[^a-z0-9]+/g, '-');
  saveBlob(`peg-${name}-card.pdf`, await api.file(`/pegs/${pegId}/card.pdf`));
}
