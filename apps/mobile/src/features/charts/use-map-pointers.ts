import { useRef, type PointerEvent } from 'react';
import { fromPage, type PagePoint } from '@mereward/shared/charts/drawing/view';
import { movedView } from '@mereward/shared/charts/drawing/view-moves';
import { cssTransform, moveTo, movementOf, newGesture, putDown, startAgain } from './map-gesture';
import type { MapSurfaceRefs } from './map-surface-refs';

type Press = PointerEvent<HTMLDivElement>;

/** Dragging, pinching, tapping, and taking hold of things on the map. */
export function useMapPointers({ box, carry, latest }: MapSurfaceRefs) {
  const gesture = useRef(newGesture());
  const held = useRef<number | null>(null);

  const at = ({ clientX, clientY }: Press): PagePoint => {
    const frame = box.current?.getBoundingClientRect();
    return { x: clientX - (frame?.left ?? 0), y: clientY - (frame?.top ?? 0) };
  };
  const placeOf = (point: PagePoint) => fromPage(latest.current.view, point.x, point.y);
  const movement = () => movementOf(gesture.current, latest.current.view, latest.current.limits);
  const settle = (): void => {
    const moved = movement();
    if (moved) latest.current.onView(movedView(latest.current.view, moved));
    startAgain(gesture.current);
  };
  const letGo = (event: Press, point: PagePoint): void => {
    if (held.current === event.pointerId) {
      held.current = null;
      latest.current.onDrag(placeOf(point), true);
      return;
    }
    const { fingers, moved } = gesture.current;
    if (!fingers.has(event.pointerId)) return;
    moveTo(gesture.current, event.pointerId, point);
    settle();
    fingers.delete(event.pointerId);
    if (fingers.size > 0) return;
    if (!moved && !gesture.current.moved) latest.current.onTap(placeOf(point));
    gesture.current = newGesture();
  };

  return {
    onPointerDown: (event: Press) => {
      if (event.button !== 0) return;
      event.currentTarget.setPointerCapture(event.pointerId);
      const point = at(event);
      if (gesture.current.fingers.size === 0 && latest.current.grabs(placeOf(point))) {
        held.current = event.pointerId;
        return;
      }
      settle();
      putDown(gesture.current, event.pointerId, point);
    },
    onPointerMove: (event: Press) => {
      const point = at(event);
      if (held.current === event.pointerId) {
        latest.current.onDrag(placeOf(point), false);
        return;
      }
      if (!gesture.current.fingers.has(event.pointerId)) return;
      moveTo(gesture.current, event.pointerId, point);
      const moved = movement();
      if (moved) carry(cssTransform(moved));
    },
    onPointerUp: (event: Press) => letGo(event, at(event)),
    onPointerCancel: (event: Press) => letGo(event, at(event)),
  };
}
