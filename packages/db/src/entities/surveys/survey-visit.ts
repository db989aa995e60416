import type { Weather, Kit } from '@mereward/shared/surveys/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('survey_visit')
export class SurveyVisit {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('uuid', { name: 'board_id' }) boardId!: string;
  @Column('uuid', { name: 'surveyor_id' }) surveyorId!: string;
  @Column('text') title!: string;
  @Column('text') competence!: 'trainee' | 'competent' | 'lead';
  @Column('timestamptz', { name: 'started_at' }) startedAt!: Date;
  @Column('timestamptz', { name: 'ended_at', nullable: true }) endedAt!: Date | null;
  @Column('double precision', { name: 'gauge_start_m' }) gaugeStartM!: number;
  @Column('double precision', { name: 'gauge_end_m', nullable: true }) gaugeEndM!: number | null;
  @Column('jsonb') weather!: Weather;
  @Column('text') clarity!: string;
  @Column('text', { name: 'weed_state' }) weedState!: string;
  @Column('jsonb') kit!: Kit;
  @Column('boolean', { name: 'consent_to_publish' }) consentToPublish!: boolean;
  @Column('bytea', { name: 'reduced_with', nullable: true }) reducedWith!: Buffer | null;
  @Column('int') version!: number;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
}
