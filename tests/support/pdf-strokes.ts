import { inflateSync } from 'node:zlib';

/** A rectangle or a line of a PDF's page, in points from the lower left: the box round all its corners. */
export type Drawn = {
  act: 'fill' | 'stroke' | 'clip';
  left: number;
  bottom: number;
  right: number;
  top: number;
};

type Matrix = readonly [number, number, number, number, number, number];

/** ISO 32000-1, 8.3.4: what is drawn under `m` after the matrix that stood before. */
const times = (m: Matrix, n: Matrix): Matrix => [
  m[0] * n[0] + m[1] * n[2],
  m[0] * n[1] + m[1] * n[3],
  m[2] * n[0] + m[3] * n[2],
  m[2] * n[1] + m[3] * n[3],
  m[4] * n[0] + m[5] * n[2] + n[4],
  m[4] * n[1] + m[5] * n[3] + n[5],
];

/** The content streams of a PDF as text; those that are no content (faces, pictures) come along and say nothing. */
export function contentOf(pdf: Buffer): string {
  const text = pdf.toString('latin1');
  const streams = [...text.matchAll(/stream\r?\n/g)].filter(
    ({ index }) => !text.startsWith('end', index - 3),
  );
  return streams
    .map(({ index, 0: mark }) => {
      const from = index + mark.length;
      const bytes = pdf.subarray(from, text.indexOf('endstream', from));
      try {
        return inflateSync(bytes).toString('latin1');
      } catch {
        return '';
      }
    })
    .join('\n');
}

/**
 * Every path that a PDF's pages draw, read from its operators (ISO 32000-1, table 59 and 60): where it really stands
 * on the paper, whatever was meant. Curves by their corners.
 */
export function drawnOn(pdf: Buffer): Drawn[] {
  const drawn: Drawn[] = [];
  const kept: Matrix[] = [];
  let matrix: Matrix = [1, 0, 0, 1, 0, 0];
  let corners: [number, number][] = [];
  let values: number[] = [];
  const add = (x: number, y: number): void => {
    corners.push([x * matrix[0] + y * matrix[2] + matrix[4], x * matrix[1] + y * matrix[3] + matrix[5]]);
  };
  const end = (act: Drawn['act'] | null): void => {
    const xs = corners.map(([x]) => x);
    const ys = corners.map(([, y]) => y);
    if (act && xs.length > 0)
      drawn.push({
        act,
        left: Math.min(...xs),
        right: Math.max(...xs),
        bottom: Math.min(...ys),
        top: Math.max(...ys),
      });
  };
  for (const [token] of contentOf(pdf).matchAll(/[^\s[\]()<>]+/g)) {
    if (/^[+-]?[\d.]+$/.test(token)) {
      values.push(Number(token));
      continue;
    }
    const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0] = values;
    if (token === 'q') kept.push(matrix);
    else if (token === 'Q') matrix = kept.pop() ?? matrix;
    else if (token === 'cm') matrix = times([a, b, c, d, e, f], matrix);
    else if (token === 'm' || token === 'l') add(a, b);
    else if (token === 'c') for (let i = 0; i < 6; i += 2) add(values[i] ?? 0, values[i + 1] ?? 0);
    else if (token === 're')
      for (const [x, y] of [
        [a, b],
        [a + c, b + d],
      ] as const)
        add(x, y);
    else if (token === 'W' || token === 'W*') end('clip');
    else if (['f', 'f*', 'F', 'S', 's', 'B', 'B*', 'n'].includes(token)) {
      end(token === 'n' ? null : token.toLowerCase().startsWith('s') ? 'stroke' : 'fill');
      corners = [];
    }
    values = [];
  }
  return drawn;
}
