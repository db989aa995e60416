import type { ClosureDetails, ClosureEffect, ClosureReason } from '@mereward/shared/closures/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A closure of water or of a method; `during` has no end until it is lifted. */
@Entity('closure')
export class Closure {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'lake_ids', array: true }) lakeIds!: string[];
  @Column('text') reason!: ClosureReason;
  @Column('text') effect!: ClosureEffect;
  @Column('tstzrange') during!: string;
  @Column('jsonb') details!: ClosureDetails;
  @Column('timestamptz', { name: 'choose_until', nullable: true }) chooseUntil!: Date | null;
  @Column('uuid', { name: 'decided_by' }) decidedBy!: string;
  @Column('timestamptz', { name: 'decided_at' }) decidedAt!: Date;
  @Column('timestamptz', { name: 'lifted_at', nullable: true }) liftedAt!: Date | null;
  @Column('uuid', { name: 'lifted_by', nullable: true }) liftedBy!: string | null;
  @Column('jsonb', { nullable: true }) lift!: { ticked: string[]; reason: string } | null; // what was ticked, and why the rest was passed over
  @Column('uuid', { name: 'move_to_lake_id', nullable: true }) moveToLakeId!: string | null; // offered to those it hits
  @Column('int') version!: number;
}
