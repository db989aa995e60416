/** A position of this device: degrees (WGS 84), the radius that holds 19 of 20, metres, and its clock, ms. */
export type DevicePosition = { lon: number; lat: number; accuracyM: number; atMs: number };

/** Why there is no position: not allowed, no signal just now, or nothing here can tell. */
export type PositionTrouble = 'denied' | 'no-signal' | 'not-here';

export type PositionListener = {
  onPosition: (position: DevicePosition) => void;
  onTrouble: (trouble: PositionTrouble) => void;
};
