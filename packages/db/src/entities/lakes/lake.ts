import type { LakeDetails } from '@mereward/shared/lakes/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('lake')
export class Lake {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('text') name!: string;
  @Column('jsonb') details!: LakeDetails;
  @Column('double precision', { name: 'origin_lon' }) originLon!: number;
  @Column('double precision', { name: 'origin_lat' }) originLat!: number;
  @Column('double precision', { name: 'area_m2' }) areaM2!: number;
  @Column('double precision', { name: 'datum_m' }) datumM!: number;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
