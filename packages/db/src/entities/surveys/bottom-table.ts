import type { BottomFeel, BottomTableKind } from '@mereward/shared/surveys/bottom-table-contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('bottom_table')
export class BottomTable {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('int') version!: number; // UNIQUE (fishery_id, version) in the migration
  @Column('text') kind!: BottomTableKind;
  @Column('jsonb', { nullable: true }) feel!: BottomFeel | null;
  @Column('uuid', { array: true }) knows!: string[];
  @Column('int', { name: 'confirmed_casts' }) confirmedCasts!: number;
  @Column('text') reason!: string;
  @Column('uuid', { name: 'made_by' }) madeBy!: string;
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;
}
