import type { MarkDetails } from '@mereward/shared/lakes/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('mark')
export class Mark {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('text') code!: string;
  @Column('jsonb') details!: MarkDetails;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
