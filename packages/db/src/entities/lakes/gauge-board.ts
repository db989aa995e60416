import type { GaugeBoardDetails } from '@mereward/shared/lakes/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('gauge_board')
export class GaugeBoard {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('text') code!: string;
  @Column('jsonb') details!: GaugeBoardDetails;
  @Column('boolean', { name: 'is_datum_board' }) isDatumBoard!: boolean;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
