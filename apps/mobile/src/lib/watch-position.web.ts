import type { PositionListener } from '@/lib/watched-position';

const NO_FIX_FOR_MS = 15_000;

/** Tells where this device is as it moves, until stopped. Without a fix for a while it says so and goes on listening. */
export function watchPosition({ onPosition, onTrouble }: PositionListener): () => void {
  if (!('geolocation' in navigator) || !window.isSecureContext) {
    onTrouble('not-here');
    return () => undefined;
  }
  const watch = navigator.geolocation.watchPosition(
    ({ coords, timestamp }) =>
      onPosition({
        lon: coords.longitude,
        lat: coords.latitude,
        accuracyM: coords.accuracy,
        atMs: timestamp,
      }),
    ({ code, PERMISSION_DENIED }) => onTrouble(code === PERMISSION_DENIED ? 'denied' : 'no-signal'),
    { enableHighAccuracy: true, maximumAge: 0, timeout: NO_FIX_FOR_MS },
  );
  return () => navigator.geolocation.clearWatch(watch);
}
