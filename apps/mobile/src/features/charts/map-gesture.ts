import type { PagePoint, View } from '@mereward/shared/charts/drawing/view';
import { clampedScale, type Movement, type ZoomLimits } from '@mereward/shared/charts/drawing/view-moves';

const TAP_SLIP_PX = 7;

export type Finger = { start: PagePoint; now: PagePoint };

/** Fingers on the map and how far they have carried it. One moves it, two also scale it. */
export type Gesture = { fingers: Map<number, Finger>; moved: boolean };

export const newGesture = (): Gesture => ({ fingers: new Map(), moved: false });

export function putDown(gesture: Gesture, id: number, at: PagePoint): void {
  gesture.fingers.set(id, { start: at, now: at });
  if (gesture.fingers.size > 1) gesture.moved = true; // two fingers never tap
}

export function moveTo(gesture: Gesture, id: number, at: PagePoint): void {
  const finger = gesture.fingers.get(id);
  if (!finger) return;
  finger.now = at;
  if (Math.hypot(at.x - finger.start.x, at.y - finger.start.y) > TAP_SLIP_PX) gesture.moved = true;
}

/** Every finger's way so far is behind it: called when a finger comes or goes and the view has been moved along. */
export function startAgain(gesture: Gesture): void {
  for (const finger of gesture.fingers.values()) finger.start = finger.now;
}

/** How the picture stands now against the view it was drawn for. */
export function movementOf(gesture: Gesture, view: View, limits: ZoomLimits): Movement | null {
  const [a, b] = [...gesture.fingers.values()];
  if (!a || !gesture.moved) return null;
  if (!b) return { scale: 1, from: a.start, to: a.now };
  const before = Math.hypot(a.start.x - b.start.x, a.start.y - b.start.y);
  const after = Math.hypot(a.now.x - b.now.x, a.now.y - b.now.y);
  const scale = before > 1 ? clampedScale(view, after / before, limits) : 1;
  return { scale, from: middle(a.start, b.start), to: middle(a.now, b.now) };
}

const middle = (a: PagePoint, b: PagePoint): PagePoint => ({ x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 });

/** The movement as a CSS transform about the page's top left corner. */
export function cssTransform({ scale, from, to }: Movement): string {
  return `translate(${String(to.x - from.x * scale)}px, ${String(to.y - from.y * scale)}px) scale(${String(scale)})`;
}
