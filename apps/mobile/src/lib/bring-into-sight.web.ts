/** Scrolls the thing with that id to the top of the screen, once what just changed is drawn. */
export function bringIntoSight(id: string): void {
  requestAnimationFrame(() => document.getElementById(id)?.scrollIntoView({ block: 'start' }));
}
