/** Words as a file may be called by: "far-ostle-2027.1". */
export const fileName = (...parts: string[]): string =>
  parts
    .join('-')
    .toLowerCase()
    .replace(/[^a-z0-9.]+/g, '-')
    .replace(/^-|-$/g, '');
