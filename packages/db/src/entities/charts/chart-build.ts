import type { BuildView } from '@mereward/shared/charts/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('chart_build')
export class ChartBuild {
  @PrimaryColumn('uuid', { name: 'chart_id' }) chartId!: string;
  @Column('uuid') attempt!: string;
  @Column('text') state!: BuildView['state'];
  @Column('text') step!: string;
  @Column('double precision') share!: number;
  @Column('text', { nullable: true }) error!: string | null;
  @Column('timestamptz', { name: 'cancel_asked_at', nullable: true }) cancelAskedAt!: Date | null;
  @Column('int', { default: 0 }) tries!: number; // runs begun since it was last asked for
  @Column('timestamptz', { name: 'updated_at' }) updatedAt!: Date;
}
