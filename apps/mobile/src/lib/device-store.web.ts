import { openDB } from 'idb';
import type { DeviceDb, DeviceSchema } from '@/lib/device-rows';

let opened: Promise<DeviceDb | null> | null = null;

/** The device's own database; null where the browser refuses one (some private windows). */
export function deviceStore(): Promise<DeviceDb | null> {
  opened ??= openDB<DeviceSchema>('mereward', 1, {
    upgrade(db) {
      db.createObjectStore('outbox', { keyPath: 'seq', autoIncrement: true }).createIndex('id', 'id', {
        unique: true,
      });
      db.createObjectStore('keys');
      db.createObjectStore('read', { keyPath: 'hash' });
      db.createObjectStore('terms');
    },
    blocking: (_from, _to, event) => {
      if (event.target instanceof IDBDatabase) event.target.close(); // a newer page needs the room
      opened = null;
    },
    terminated: () => {
      opened = null;
    },
  }).catch(() => null);
  return opened;
}
