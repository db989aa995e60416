import type { DecideDisagreement, Disagree, DisagreementStatus } from '@mereward/shared/charts/disagreement';
import type { ReportedPlace, ReportEvidence } from '@mereward/shared/charts/reported-evidence';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('disagreement')
export class Disagreement {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'peg_id' }) pegId!: string;
  @Column('uuid', { name: 'chart_id', nullable: true }) chartId!: string | null;
  @Column('uuid', { name: 'reported_by' }) reportedBy!: string;
  @Column('timestamptz', { name: 'reported_at' }) reportedAt!: Date;
  @Column('date') day!: string;
  @Column('jsonb') told!: Disagree;
  @Column('jsonb') place!: Omit<ReportedPlace, 'ok'> & { words: string };
  @Column('text') status!: DisagreementStatus;
  @Column('uuid', { name: 'decided_by', nullable: true }) decidedBy!: string | null;
  @Column('timestamptz', { name: 'decided_at', nullable: true }) decidedAt!: Date | null;
  @Column('jsonb', { nullable: true }) decision!: DecideDisagreement | null;
  @Column('uuid', { name: 'taken_back_by', nullable: true }) takenBackBy!: string | null;
  @Column('timestamptz', { name: 'taken_back_at', nullable: true }) takenBackAt!: Date | null;
  @Column('text', { name: 'taken_back_reason', nullable: true }) takenBackReason!: string | null;
  @Column('jsonb', { nullable: true }) evidence!: ReportEvidence | null;
}
