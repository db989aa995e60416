import { Column, Entity, PrimaryColumn } from 'typeorm';

/** Who read which version, when and how: on a screen, on paper, or read aloud by a witness. */
@Entity('rule_acknowledgement')
export class RuleAcknowledgement {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'rule_sheet_id' }) ruleSheetId!: string;
  @Column('uuid', { name: 'account_id', nullable: true }) accountId!: string | null;
  @Column('uuid', { name: 'booking_id', nullable: true }) bookingId!: string | null;
  @Column('text') method!: 'online' | 'paper' | 'verbal';
  @Column('uuid', { nullable: true }) witness!: string | null;
  @Column('text') language!: string;
  @Column('timestamptz', { name: 'device_at' }) deviceAt!: Date; // as the device told it
  @Column('timestamptz') at!: Date;
  @Column('text') device!: string;
}
