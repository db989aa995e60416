import { LogRefusal } from '@mereward/shared/surveys/log-point';
import type { GpxFile, GpxPointText } from '@mereward/shared/surveys/gpx-log';
import { SaxesParser, type SaxesTagNS } from 'saxes';

const POINTS = new Set(['wpt', 'trkpt', 'rtept']);
/** No element of a GPX file is nested nearly so deep. */
const DEEPEST = 64;
/** No tag of a GPX file comes near. */
const LONGEST_TAG = /<[a-z_:][^<>]{4000}/i;

/**
 * The points of a GPX file with their lines. Strict about XML; document types, and with them entities of the file's own,
 * are refused before anything is read of them. Throws LogRefusal.
 */
export function gpxPoints(name: string, text: string, tell: (share: number) => void): GpxFile {
  if (LONGEST_TAG.test(text))
    refuse(name, 1, 'It holds a tag of thousands of letters, which no GPX file does. Export it again.');
  const reader = new PointReader(name);
  reader.read(text, tell);
  return { name, points: reader.points, cautions: reader.cautions };
}

function refuse(file: string, line: number, detail: string): never {
  throw new LogRefusal({ file, unit: 'line', at: line, value: '', detail });
}

const PIECE = 1 << 20;

class PointReader {
  readonly points: GpxPointText[] = [];
  readonly cautions: string[] = [];
  private readonly parser = new SaxesParser({ xmlns: true });
  private readonly path: string[] = [];
  private point: GpxPointText | null = null;
  private words = '';

  constructor(private readonly name: string) {
    this.parser.on('error', ({ message }) => {
      const said = message.replace(/^\d+:\d+: /, '').slice(0, 120);
      refuse(name, this.parser.line, `It is not whole XML (${said}) or was cut short. Export it again.`);
    });
    this.parser.on('doctype', () =>
      refuse(
        name,
        this.parser.line,
        'It declares a document type, which a GPX file has no need of and which can be used to read other files. It was not read; export it again.',
      ),
    );
    this.parser.on('opentag', (tag) => this.open(tag));
    this.parser.on('closetag', ({ local }) => this.close(local));
    this.parser.on('text', (text) => this.hear(text));
    this.parser.on('cdata', (text) => this.hear(text));
  }

  read(text: string, tell: (share: number) => void): void {
    for (let from = 0; from < text.length; from += PIECE) {
      this.parser.write(text.slice(from, from + PIECE));
      tell(Math.min(1, (from + PIECE) / text.length));
    }
    this.parser.close();
  }

  private hear(text: string): void {
    if (this.point && this.words.length < 200) this.words += text;
  }

  private open({ local, attributes }: SaxesTagNS): void {
    if (this.path.length === 0) this.root(local, attributes['version']?.value);
    if (this.path.length >= DEEPEST)
      refuse(this.name, this.parser.line, 'It is nested deeper than any GPX file. Export it again.');
    this.path.push(local);
    this.words = '';
    if (!POINTS.has(local) || this.point) return;
    const lat = attributes['lat']?.value ?? null;
    const lon = attributes['lon']?.value ?? null;
    this.point = { line: this.parser.line, lat, lon, ele: null, time: null, depth: null };
  }

  private root(local: string, version: string | undefined): void {
    if (local !== 'gpx')
      refuse(this.name, this.parser.line, `It is XML but not GPX: it begins with <${local.slice(0, 40)}>.`);
    if (version !== '1.1')
      this.cautions.push(
        `${this.name} says it is GPX ${version ?? 'without a version'}; it was read as 1.1.`,
      );
  }

  private close(local: string): void {
    const { point, words, path } = this;
    const inExtension = path.includes('extensions');
    path.pop();
    if (!point) return;
    if (POINTS.has(local)) {
      this.points.push(point);
      this.point = null;
    } else if (inExtension && local.toLowerCase() === 'depth') point.depth ??= words;
    else if (!inExtension && local === 'ele') point.ele ??= words;
    else if (!inExtension && local === 'time') point.time ??= words;
  }
}
