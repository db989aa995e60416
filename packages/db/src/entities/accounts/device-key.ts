import { Column, Entity, PrimaryColumn } from 'typeorm';

/** The key with which this account's phones seal what they have still to send. */
@Entity('device_key')
export class DeviceKey {
  @PrimaryColumn('uuid', { name: 'account_id' }) accountId!: string;
  @Column('bytea') key!: Buffer; // 32 bytes
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;
}
