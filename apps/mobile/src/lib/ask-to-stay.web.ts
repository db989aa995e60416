let asked = false;

/** Asks the browser not to clear this site away when the device runs short of room. Asked once; it may say no. */
export function askToStay(): void {
  if (asked || !('storage' in navigator) || typeof navigator.storage.persist !== 'function') return;
  asked = true;
  void navigator.storage.persist().catch(() => false);
}
