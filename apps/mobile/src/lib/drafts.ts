import { draftKey } from '@/lib/draft-text';
import { storage } from '@/lib/storage';

/** At sign-out: what this person had begun is not left for the next one at this device. */
export async function forgetDrafts(accountId: string): Promise<void> {
  await new Promise((later) => setTimeout(later, 0)); // a form leaving the screen may be keeping its last words
  const own = (await storage.keys()).filter((key) => key.startsWith(draftKey(accountId, '')));
  await Promise.all(own.map((key) => storage.remove(key)));
}
