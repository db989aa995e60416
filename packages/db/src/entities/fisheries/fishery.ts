import type { FisheryDetails } from '@mereward/shared/fisheries/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('fishery')
export class Fishery {
  @PrimaryColumn('uuid') id!: string;
  @Column('text') name!: string;
  @Column('text') zone!: string;
  @Column('jsonb') details!: FisheryDetails;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
