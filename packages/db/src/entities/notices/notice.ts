import type { NoticeDetails, NoticeSeverity } from '@mereward/shared/notices/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('notice')
export class Notice {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'lake_ids', array: true }) lakeIds!: string[]; // none: the whole fishery
  @Column('text') severity!: NoticeSeverity;
  @Column('tstzrange') during!: string;
  @Column('uuid', { name: 'closure_id', nullable: true }) closureId!: string | null;
  @Column('jsonb') details!: NoticeDetails;
  @Column('uuid', { name: 'written_by' }) writtenBy!: string;
  @Column('timestamptz', { name: 'written_at' }) writtenAt!: Date;
  @Column('timestamptz', { name: 'taken_down_at', nullable: true }) takenDownAt!: Date | null;
  @Column('int') version!: number;
}
