const held = new Map<string, string>();

/**
 * What the address says behind its `#` under that name, which no server is told. It is taken out of the address at once
 * and held by this page until it is forgotten: whoever has to sign in first finds it afterwards.
 */
export function linkPart(name: string): string | null {
  const said = new URLSearchParams(location.hash.slice(1)).get(name);
  if (said !== null) {
    held.set(name, said);
    history.replaceState(history.state, '', location.pathname + location.search);
  }
  return held.get(name) ?? null;
}

export const forgetLinkPart = (name: string): void => void held.delete(name);

/** Where this program is opened from. */
export const pageOrigin = (): string | null => location.origin;
