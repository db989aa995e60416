/** Numbers from 0 up to below `below`, the same after the same seed. Source: Park and Miller, CACM 31, 1988. */
export function chances(seed: number): (below: number) => number {
  let state = (seed % 2_147_483_646) + 1;
  return (below) => {
    state = (state * 48_271) % 2_147_483_647;
    return state % below;
  };
}

/** What breaks readers: ends of things begun, other marks, numbers at the edge of what there is. */
const PIECES = [
  '"', "'", ',', ';', '\t', '\n', '\r\n', '\0', '\uFEFF', '\uFFFD', '<', '>', '/>', '&', '&#0;', '&x;', ']]>',
  '<!--', '<![CDATA[', '<!DOCTYPE gpx>', '<?xml?>', '{', '}', '[', ']', ':', 'null', 'true', '1e999', '-0', 'NaN',
  'Infinity', '1,234', '-91', '181', '0x1F', '9'.repeat(40), '.', '*', '$', '$GPGGA,', '*00', '−', '°', 'é', '😀',
  '\uD800', '__proto__', 'constructor', '2026-13-45T99:99:99Z', '=1+1', ' ',
]; // prettier-ignore

const copies = (text: string, from: number, to: number, times: number): string =>
  text.slice(0, to) + text.slice(from, to).repeat(times) + text.slice(to);

/** The text with one to four things done to it that a bad disk, a bad program or a bad hand might do. */
export function mutated(text: string, chance: (below: number) => number, others: readonly string[]): string {
  let out = text;
  for (let left = 1 + chance(4); left > 0; left--) {
    const from = chance(out.length + 1);
    const to = Math.min(out.length, from + 1 + chance(chance(4) === 0 ? 400 : 8));
    const piece = PIECES[chance(PIECES.length)] ?? '';
    switch (chance(8)) {
      case 0:
        out = out.slice(0, from) + String.fromCharCode(chance(256)) + out.slice(from + 1);
        break;
      case 1:
        out = out.slice(0, from) + out.slice(to);
        break;
      case 2:
        out = out.slice(0, from) + piece + out.slice(from);
        break;
      case 3:
        out = out.slice(0, from) + piece + out.slice(to);
        break;
      case 4:
        out = copies(out, from, to, 1 + chance(3));
        break;
      case 5:
        out = chance(6) === 0 ? out.slice(0, from) : out.slice(0, from) + out.slice(to) + out.slice(from, to);
        break;
      case 6: {
        const other = others[chance(others.length)] ?? '';
        const at = chance(other.length + 1);
        out = out.slice(0, from) + other.slice(at, at + chance(200)) + out.slice(from);
        break;
      }
      case 7:
        out = out.replace(/\d+(\.\d+)?/g, (number) => (chance(12) === 0 ? piece : number));
        break;
    }
  }
  return out;
}
