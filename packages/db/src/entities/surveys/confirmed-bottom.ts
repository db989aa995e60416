import type { ConfirmedBy } from '@mereward/shared/surveys/confirmed-contract';
import type { Cover, Substrate } from '@mereward/shared/surveys/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('confirmed_bottom')
export class ConfirmedBottom {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('uuid', { name: 'cast_id', nullable: true }) castId!: string | null;
  @Column('double precision') lon!: number;
  @Column('double precision') lat!: number;
  @Column('double precision', { name: 'position_sigma_m' }) positionSigmaM!: number;
  @Column('text', { nullable: true }) substrate!: Substrate | null;
  @Column('text', { nullable: true }) cover!: Cover | null;
  @Column('text') method!: ConfirmedBy;
  @Column('date') day!: string;
  @Column('text') note!: string;
  @Column('uuid', { name: 'confirmed_by' }) confirmedBy!: string;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
  @Column('timestamptz', { name: 'taken_back_at', nullable: true }) takenBackAt!: Date | null;
}
