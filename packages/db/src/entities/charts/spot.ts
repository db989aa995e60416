import type { SpotDetails } from '@mereward/shared/charts/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('spot')
export class Spot {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'peg_id' }) pegId!: string;
  @Column('jsonb') details!: SpotDetails;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
