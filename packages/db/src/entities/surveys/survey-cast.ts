import type { CastObservation, Reduced } from '@mereward/shared/surveys/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('survey_cast')
export class SurveyCast {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'visit_id' }) visitId!: string;
  @Column('uuid', { name: 'peg_id' }) pegId!: string;
  @Column('uuid', { name: 'line_id' }) lineId!: string;
  @Column('uuid', { name: 'import_id', nullable: true }) importId!: string | null;
  @Column('int') seq!: number;
  @Column('timestamptz', { name: 'observed_at' }) observedAt!: Date;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
  @Column('uuid', { name: 'kept_by' }) keptBy!: string;
  @Column('jsonb') observation!: CastObservation;
  @Column('timestamptz', { name: 'undone_at', nullable: true }) undoneAt!: Date | null;
  @Column('jsonb') reduced!: Reduced;
}
