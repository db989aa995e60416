/** A phone's own system opens no address with a part of this kind. */
export const linkPart = (_name: string): string | null => null;
export const forgetLinkPart = (_name: string): void => undefined;

/** Where this program is opened from; nowhere on a phone's own system. */
export const pageOrigin = (): string | null => null;
