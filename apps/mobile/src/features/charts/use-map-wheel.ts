import { useEffect } from 'react';
import type { PagePoint } from '@mereward/shared/charts/drawing/view';
import { clampedScale, movedView } from '@mereward/shared/charts/drawing/view-moves';
import { cssTransform } from './map-gesture';
import type { MapSurfaceRefs } from './map-surface-refs';

const SETTLES_AFTER_MS = 160;
const PER_PX = 0.0016;
const PER_PX_PINCHED = 0.01; // a pad's pinch comes as small wheel steps with the control key
const LINE_PX = 20;

/** The wheel scales about the pointer; the drawing follows when it has come to rest. */
export function useMapWheel({ box, carry, latest }: MapSurfaceRefs): void {
  useEffect(() => {
    const element = box.current;
    if (!element) return undefined;
    let scale = 1;
    let about: PagePoint = { x: 0, y: 0 };
    let timer: ReturnType<typeof setTimeout> | undefined;
    const settle = (): void => {
      const { view, onView } = latest.current;
      if (scale !== 1) onView(movedView(view, { scale, from: about, to: about }));
      scale = 1;
    };
    const turn = (event: WheelEvent): void => {
      event.preventDefault();
      const frame = element.getBoundingClientRect();
      const { view, limits } = latest.current;
      if (scale === 1) about = { x: event.clientX - frame.left, y: event.clientY - frame.top };
      const px = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? event.deltaY * LINE_PX : event.deltaY;
      scale = clampedScale(view, scale * Math.exp(-px * (event.ctrlKey ? PER_PX_PINCHED : PER_PX)), limits);
      carry(cssTransform({ scale, from: about, to: about }));
      clearTimeout(timer);
      timer = setTimeout(settle, SETTLES_AFTER_MS);
    };
    element.addEventListener('wheel', turn, { passive: false });
    return () => {
      clearTimeout(timer);
      element.removeEventListener('wheel', turn);
    };
  }, [box, carry, latest]);
}
