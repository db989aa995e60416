import { useCallback, useMemo } from 'react';
import { ruled, text, type Mark } from '@mereward/shared/charts/drawing/mark';
import { OWN_PIXELS } from '@/features/charts/picture-backdrop';
import { LakeCanvas, type Draw } from '@/features/charts/lake-canvas';
import type { DraftPoint } from '@/features/lakes/picture-draft';

const CROSS = 'm-11 0h22m-11 -11v22';
const RING = 'm-8 0a8 8 0 1 0 16 0a8 8 0 1 0 -16 0z';

type Props = {
  picture: { url: string; widthPx: number; heightPx: number };
  points: readonly DraftPoint[];
  chosen: number | null;
  onAdd: (xPx: number, yPx: number) => void;
  onChoose: (at: number) => void;
  onMove: (at: number, xPx: number, yPx: number) => void;
};

/** A picture in its own pixels: a tap sets a point on it, a drag moves one. */
export function PictureCanvas({ picture, points, chosen, onAdd, onChoose, onMove }: Props) {
  const { url, widthPx, heightPx } = picture;
  const backdrop = useMemo(
    () => ({ url, widthPx, heightPx, transform: OWN_PIXELS, opacity: 1 }),
    [url, widthPx, heightPx],
  );
  const frame = useMemo(() => [[0, -heightPx, widthPx, 0]], [widthPx, heightPx]);
  const onPicture = (xM: number, yM: number): [number, number] => [
    Math.round(Math.min(widthPx, Math.max(0, xM)) * 10) / 10,
    Math.round(Math.min(heightPx, Math.max(0, -yM)) * 10) / 10,
  ];
  const over = useCallback<Draw>(
    ({ palette }) =>
      points.flatMap(({ xPx, yPx }, at): Mark[] => {
        const place = [xPx, -yPx];
        const colour = at === chosen ? palette.selected : palette.ink;
        const glyph = (path: string, stroke: ReturnType<typeof ruled>): Mark => ({
          kind: 'glyphs',
          at: place,
          glyph: path,
          fill: null,
          stroke,
        });
        return [
          glyph(RING, ruled(palette.paper, 6)),
          glyph(CROSS, ruled(palette.paper, 5)),
          glyph(RING, ruled(colour, 2.6)),
          glyph(CROSS, ruled(colour, 1.6)),
          text({
            words: String(at + 1),
            ...{ x: xPx, y: -yPx, dxPx: 18, dyPx: -14 },
            bold: true,
            sizePx: 17,
            colour,
            halo: palette.paper,
          }),
        ];
      }),
    [points, chosen],
  );
  return (
    <LakeCanvas
      label="The picture: tap a place you know"
      frame={frame}
      under={NOTHING}
      over={over}
      backdrop={backdrop}
      groundless
      handles={points.map(({ xPx, yPx }, at) => ({ xM: xPx, yM: -yPx, id: String(at) }))}
      onTap={({ xM, yM }) => {
        if (xM >= 0 && xM <= widthPx && yM <= 0 && yM >= -heightPx) onAdd(...onPicture(xM, yM));
      }}
      onPick={(id) => onChoose(Number(id))}
      onMove={(id, { xM, yM }) => onMove(Number(id), ...onPicture(xM, yM))}
      heightPx={480}
    />
  );
}

const NOTHING: Draw = () => [];
