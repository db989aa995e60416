/** Scrolls the thing with that id to the top of the screen. On a phone's own build the screen stays as it is. */
export function bringIntoSight(_id: string): void {
  // only a browser can be asked for a thing by its id
}
