import type { Kit } from '@mereward/shared/surveys/contract';
import type { KnownFall, LeadCalibration as Calibration } from '@mereward/shared/surveys/lead-fall';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('lead_calibration')
export class LeadCalibration {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('text') name!: string;
  @Column('double precision', { name: 'lead_g' }) leadG!: number;
  @Column('text', { name: 'lead_shape' }) leadShape!: Kit['leadShape'];
  @Column('text', { name: 'line_type' }) lineType!: Kit['lineType'];
  @Column('jsonb') falls!: KnownFall[];
  @Column('jsonb') calibration!: Calibration;
  @Column('date', { name: 'calibrated_on' }) calibratedOn!: string;
  @Column('text') note!: string;
  @Column('uuid', { name: 'calibrated_by' }) calibratedBy!: string;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
  @Column('timestamptz', { name: 'put_away_at', nullable: true }) putAwayAt!: Date | null;
}
