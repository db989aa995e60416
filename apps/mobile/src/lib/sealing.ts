/** Something sealed: AES-GCM (NIST SP 800-38D) with a nonce of its own, 96 bits. */
export type Sealed = { iv: Uint8Array<ArrayBuffer>; bytes: ArrayBuffer };

/** What a seal is about is bound into it: one moved to another row does not open. */
const terms = (iv: Uint8Array<ArrayBuffer>, about: string): AesGcmParams => ({
  name: 'AES-GCM',
  iv,
  additionalData: new TextEncoder().encode(about),
});

/** A key of 32 bytes given as base64url, which no script can read out again. */
export function sealingKey(base64url: string): Promise<CryptoKey> {
  const text = atob(base64url.replaceAll('-', '+').replaceAll('_', '/'));
  const bytes = Uint8Array.from(text, (letter) => letter.charCodeAt(0));
  return crypto.subtle.importKey('raw', bytes, 'AES-GCM', false, ['encrypt', 'decrypt']);
}

export async function seal(key: CryptoKey, content: unknown, about: string): Promise<Sealed> {
  const iv = crypto.getRandomValues(new Uint8Array(12));
  const text = new TextEncoder().encode(JSON.stringify(content));
  return { iv, bytes: await crypto.subtle.encrypt(terms(iv, about), key, text) };
}

/** What was sealed; null when another key sealed it, or it was changed since. */
export async function unseal(key: CryptoKey, { iv, bytes }: Sealed, about: string): Promise<unknown> {
  try {
    const text = await crypto.subtle.decrypt(terms(iv, about), key, bytes);
    return JSON.parse(new TextDecoder().decode(text));
  } catch {
    return null;
  }
}

/** False on plain http away from this machine, where browsers give pages no cryptography. */
export const canSeal = (): boolean => typeof crypto !== 'undefined' && crypto.subtle !== undefined;
