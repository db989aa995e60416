import type { LogCell, LogRun } from '@mereward/shared/charts/left-out-contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('chart_left_out')
export class ChartLeftOut {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'chart_id' }) chartId!: string;
  @Column('uuid', { name: 'cast_id', nullable: true }) castId!: string | null;
  @Column('uuid', { name: 'log_id', nullable: true }) logId!: string | null;
  @Column('jsonb', { nullable: true }) part!: LogCell | LogRun | null;
  @Column('text') reason!: string;
  @Column('uuid', { name: 'left_out_by' }) leftOutBy!: string;
  @Column('timestamptz', { name: 'left_out_at' }) leftOutAt!: Date;
  @Column('uuid', { name: 'put_back_by', nullable: true }) putBackBy!: string | null;
  @Column('timestamptz', { name: 'put_back_at', nullable: true }) putBackAt!: Date | null;
}
