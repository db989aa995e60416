/** A code letter by letter, as a screen reader is to say it: "7, K, D, M, X, P". */
export const spokenCode = (code: string): string => [...code].join(', ');
