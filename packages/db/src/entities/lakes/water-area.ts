import type { WaterAreaDetails } from '@mereward/shared/lakes/peg-water-contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('water_area')
export class WaterArea {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('uuid', { name: 'peg_id', nullable: true }) pegId!: string | null;
  @Column('int') place!: number; // the greatest lies on top
  @Column('jsonb') details!: WaterAreaDetails;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
