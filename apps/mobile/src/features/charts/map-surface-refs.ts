import type { RefObject } from 'react';
import type { MapSurfaceProps } from './map-surface-props';

/** What the hooks of a map share: its box, what moves in it, and what it was last told. */
export type MapSurfaceRefs = {
  box: RefObject<HTMLDivElement | null>;
  moving: RefObject<HTMLDivElement | null>;
  latest: RefObject<MapSurfaceProps>;
};
