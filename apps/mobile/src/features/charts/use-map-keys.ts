import type { KeyboardEvent, RefObject } from 'react';
import { pannedView, zoomedView } from '@mereward/shared/charts/drawing/view-moves';
import type { MapSurfaceProps } from './map-surface-props';

const STEP_SHARE = 0.18;
export const ZOOM_STEP = 1.5;

/** Arrows move the map, + and − scale it, 0 shows all of it. */
export function useMapKeys(latest: RefObject<MapSurfaceProps>) {
  return (event: KeyboardEvent): void => {
    const { view, limits, onView, onFit } = latest.current;
    const across = view.widthPx * STEP_SHARE;
    const down = view.heightPx * STEP_SHARE;
    const deeds: Record<string, () => void> = {
      ArrowLeft: () => onView(pannedView(view, across, 0)),
      ArrowRight: () => onView(pannedView(view, -across, 0)),
      ArrowUp: () => onView(pannedView(view, 0, down)),
      ArrowDown: () => onView(pannedView(view, 0, -down)),
      '+': () => onView(zoomedView(view, ZOOM_STEP, limits)),
      '=': () => onView(zoomedView(view, ZOOM_STEP, limits)),
      '-': () => onView(zoomedView(view, 1 / ZOOM_STEP, limits)),
      '0': onFit,
    };
    const deed = event.ctrlKey || event.metaKey || event.altKey ? undefined : deeds[event.key];
    if (!deed) return;
    event.preventDefault();
    deed();
  };
}
