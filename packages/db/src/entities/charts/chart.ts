import type { ChartStatus, GridFrame } from '@mereward/shared/charts/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('chart')
export class Chart {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('text') title!: string;
  @Column('uuid', { array: true, name: 'visit_ids' }) visitIds!: string[];
  @Column('double precision', { name: 'contour_step_m' }) contourStepM!: number;
  @Column('text') status!: ChartStatus;
  @Column('text', { nullable: true }) version!: string | null;
  @Column('double precision', { name: 'datum_m' }) datumM!: number;
  @Column('date', { name: 'surveyed_from', nullable: true }) surveyedFrom!: string | null;
  @Column('date', { name: 'surveyed_to', nullable: true }) surveyedTo!: string | null;
  @Column('bytea', { name: 'input_sha256', nullable: true }) inputSha256!: Buffer | null;
  @Column('jsonb') built!: unknown;
  @Column('jsonb', { nullable: true }) frame!: GridFrame | null;
  @Column('bytea', { nullable: true }) depth!: Buffer | null;
  @Column('bytea', { nullable: true }) sigma!: Buffer | null;
  @Column('bytea', { nullable: true }) substrate!: Buffer | null;
  @Column('bytea', { nullable: true }) cover!: Buffer | null;
  @Column('timestamptz', { name: 'built_at', nullable: true }) builtAt!: Date | null;
  @Column('uuid', { name: 'drafted_by' }) draftedBy!: string;
  @Column('timestamptz', { name: 'drafted_at' }) draftedAt!: Date;
  @Column('uuid', { name: 'submitted_by', nullable: true }) submittedBy!: string | null;
  @Column('timestamptz', { name: 'submitted_at', nullable: true }) submittedAt!: Date | null;
  @Column('uuid', { name: 'approved_by', nullable: true }) approvedBy!: string | null;
  @Column('timestamptz', { name: 'published_at', nullable: true }) publishedAt!: Date | null;
  @Column('uuid', { name: 'superseded_by', nullable: true }) supersededBy!: string | null;
  @Column('text', { name: 'withdrawn_reason', nullable: true }) withdrawnReason!: string | null;
  @Column('timestamptz', { name: 'withdrawn_at', nullable: true }) withdrawnAt!: Date | null;
}
