import type { RefObject } from 'react';
import type { MapSurfaceProps } from './map-surface-props';

/** What the hooks of a map share: its box, how its drawing is moved, and what it was last told. */
export type MapSurfaceRefs = {
  box: RefObject<HTMLDivElement | null>;
  /** Moves the finished drawing by a CSS transform. */
  carry: (transform: string) => void;
  latest: RefObject<MapSurfaceProps>;
};
