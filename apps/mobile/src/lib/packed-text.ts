/** Whether this browser can pack at all. */
export const canPack = (): boolean =>
  typeof CompressionStream !== 'undefined' && typeof DecompressionStream !== 'undefined';

const FORMAT = 'deflate-raw'; // RFC 1951

async function through(
  bytes: Uint8Array<ArrayBuffer>,
  change: CompressionStream | DecompressionStream,
  mostBytes: number,
): Promise<Uint8Array<ArrayBuffer> | null> {
  const reader = new Blob([bytes]).stream().pipeThrough(change).getReader();
  const parts: Uint8Array<ArrayBuffer>[] = [];
  let length = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    length += value.length;
    if (length > mostBytes) {
      await reader.cancel();
      return null;
    }
    parts.push(value);
  }
  return new Uint8Array(await new Blob(parts).arrayBuffer());
}

/** A text packed into letters that an address may hold (RFC 1951 in base64url, RFC 4648 §5, without padding). */
export async function packedText(text: string): Promise<string> {
  const bytes = await through(new TextEncoder().encode(text), new CompressionStream(FORMAT), Infinity);
  const letters = Array.from(bytes ?? [], (byte) => String.fromCharCode(byte)).join('');
  return btoa(letters).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
}

/** The text again; null when it was cut, changed, or unpacks to more than `mostBytes`. */
export async function unpackedText(packed: string, mostBytes: number): Promise<string | null> {
  try {
    const letters = atob(packed.replaceAll('-', '+').replaceAll('_', '/'));
    const bytes = Uint8Array.from(letters, (letter) => letter.charCodeAt(0));
    const plain = await through(bytes, new DecompressionStream(FORMAT), mostBytes);
    return plain && new TextDecoder('utf-8', { fatal: true }).decode(plain);
  } catch {
    return null;
  }
}
