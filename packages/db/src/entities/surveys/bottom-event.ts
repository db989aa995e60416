import type { LakePolygon } from '@mereward/shared/lakes/contract';
import type { BottomEventKind, EventEnds } from '@mereward/shared/surveys/bottom-event-contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('bottom_event')
export class BottomEvent {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('text') kind!: BottomEventKind;
  @Column('jsonb', { nullable: true }) area!: LakePolygon | null;
  @Column('date', { name: 'happened_on' }) happenedOn!: string;
  @Column('text', { array: true }) ends!: EventEnds[];
  @Column('text') note!: string;
  @Column('uuid', { name: 'recorded_by' }) recordedBy!: string;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
  @Column('timestamptz', { name: 'taken_back_at', nullable: true }) takenBackAt!: Date | null;
}
