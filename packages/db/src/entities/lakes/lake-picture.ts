import type { FitKind, PictureTransform } from '@mereward/shared/geometry/picture-fit';
import type { PicturePoint } from '@mereward/shared/lakes/picture-contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('lake_picture')
export class LakePicture {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('text') caption!: string;
  @Column('text') state!: 'waiting' | 'ready' | 'refused';
  @Column('text', { nullable: true }) refusal!: string | null;
  @Column('int', { name: 'width_px', nullable: true }) widthPx!: number | null;
  @Column('int', { name: 'height_px', nullable: true }) heightPx!: number | null;
  @Column('bytea') sha256!: Buffer;
  @Column('text') fit!: FitKind;
  @Column('jsonb') points!: PicturePoint[];
  @Column('jsonb', { nullable: true }) transform!: PictureTransform | null;
  @Column('double precision', { name: 'rms_m', nullable: true }) rmsM!: number | null;
  @Column('int') version!: number;
  @Column('uuid', { name: 'added_by' }) addedBy!: string;
  @Column('timestamptz', { name: 'added_at' }) addedAt!: Date;
}
