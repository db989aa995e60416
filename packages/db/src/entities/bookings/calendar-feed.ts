import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A secret address of an iCalendar: one's own bookings, or with a lake its whole calendar without names. */
@Entity('calendar_feed')
export class CalendarFeed {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'account_id' }) accountId!: string;
  @Column('uuid', { name: 'lake_id', nullable: true }) lakeId!: string | null;
  @Column('bytea', { name: 'token_digest' }) tokenDigest!: Buffer;
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;
  @Column('timestamptz', { name: 'revoked_at', nullable: true }) revokedAt!: Date | null;
}
