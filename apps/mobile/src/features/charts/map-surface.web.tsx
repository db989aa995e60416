import { useCallback, useEffect, useLayoutEffect, useRef, type CSSProperties } from 'react';
import type { View as MapView } from '@mereward/shared/charts/drawing/view';
import { useTheme } from '@/hooks/use-theme';
import { type MapSurfaceProps, OVERSCAN } from './map-surface-props';
import { cssTransformOf, type Backdrop } from './picture-backdrop';
import { useMapKeys } from './use-map-keys';
import { useMapPointers } from './use-map-pointers';
import { useMapWheel } from './use-map-wheel';

const fill: CSSProperties = { position: 'absolute', inset: 0 };

/**
 * The map one pans, pinches, wheels and steers by keys. A gesture moves the finished drawing by a CSS transform alone;
 * it is drawn again when the gesture ends.
 */
export function MapSurface(props: MapSurfaceProps) {
  const { backdrop, layers, fixed, view, label } = props;
  const { colours } = useTheme();
  const box = useRef<HTMLDivElement>(null);
  const moving = useRef<HTMLDivElement>(null);
  const latest = useRef(props);
  useEffect(() => {
    latest.current = props;
  });
  // The new drawing stands where the moved old one stood, so the transform goes in the same frame.
  useLayoutEffect(() => {
    if (moving.current) moving.current.style.transform = '';
  }, [view, layers, backdrop]);
  const carry = useCallback((transform: string): void => {
    if (moving.current) moving.current.style.transform = transform;
  }, []);
  const surface = { box, carry, latest };
  const pointers = useMapPointers(surface);
  useMapWheel(surface);
  const onKeyDown = useMapKeys(latest);
  const drawing: CSSProperties = {
    position: 'absolute',
    left: -view.widthPx * OVERSCAN,
    top: -view.heightPx * OVERSCAN,
    lineHeight: 0,
  };
  return (
    <div
      ref={box}
      className="map"
      role="application"
      aria-roledescription="chart"
      aria-label={`${label}. Arrow keys move it, plus and minus scale it, nought shows all of it.`}
      tabIndex={0}
      onKeyDown={onKeyDown}
      {...pointers}
      style={{
        ...fill,
        overflow: 'hidden',
        touchAction: 'none',
        userSelect: 'none',
        cursor: 'grab',
        backgroundColor: colours.paper,
      }}
    >
      <div ref={moving} style={{ ...fill, transformOrigin: '0 0', willChange: 'transform' }}>
        {backdrop ? <BackdropPicture backdrop={backdrop} view={view} /> : null}
        {layers.map((svg, i) => (
          <div key={i} aria-hidden style={drawing} dangerouslySetInnerHTML={{ __html: svg }} />
        ))}
      </div>
      <div
        aria-hidden
        style={{ ...fill, pointerEvents: 'none', lineHeight: 0 }}
        dangerouslySetInnerHTML={{ __html: fixed }}
      />
    </div>
  );
}

/** The picture keeps its element while the view changes, so that it is not decoded anew at every step. */
function BackdropPicture({ backdrop, view }: { backdrop: Backdrop; view: MapView }) {
  const { url, widthPx, heightPx, opacity } = backdrop;
  return (
    <img
      src={url}
      alt=""
      draggable={false}
      style={{
        position: 'absolute',
        left: 0,
        top: 0,
        width: widthPx,
        height: heightPx,
        maxWidth: 'none',
        transformOrigin: '0 0',
        transform: cssTransformOf(backdrop, view),
        opacity,
        pointerEvents: 'none',
      }}
    />
  );
}
