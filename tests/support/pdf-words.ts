import { spawnSync } from 'node:child_process';

/** Whether another program that reads PDFs is installed here. */
export const readsPdf = spawnSync('pdftotext', ['-v']).error === undefined;

/** A PDF's words page by page, as that program reads them, spaces and line ends made one space. */
export function pagesOf(pdf: Buffer): string[] {
  const { stdout } = spawnSync('pdftotext', ['-', '-'], { input: pdf, maxBuffer: 2 ** 26 });
  return String(stdout)
    .split('\f')
    .slice(0, -1)
    .map((page) => page.replace(/\s+/g, ' '));
}
