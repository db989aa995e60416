import type { DBSchema, IDBPDatabase } from 'idb';
import type { Sealed } from '@/lib/sealing';

/** One thing to be sent as it lies on the device: who made it and how it stands, and the rest sealed. */
export type OutboxRow = {
  seq?: number; // of this device, counted up by the store and never given twice
  id: string;
  accountId: string;
  state: 'waiting' | 'refused' | 'sent';
  attempts: number; // times it has left for the server; 0: certainly not there
  sealed: Sealed; // an `OutboxEvent`
  refusal: Sealed | null; // what the server said, a `Refusal`
};

/** One kept reading: a query as the query library hands it out. */
export type ReadRow = { hash: string; at: number; query: unknown };

export interface DeviceSchema extends DBSchema {
  outbox: { key: number; value: OutboxRow; indexes: { id: string } };
  keys: { key: string; value: CryptoKey }; // by account, until it signs out
  read: { key: string; value: ReadRow };
  terms: { key: string; value: string }; // of the kept readings: whose, and of which shape
}

export type DeviceDb = IDBPDatabase<DeviceSchema>;
