import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('photo')
export class Photo {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'peg_id', nullable: true }) pegId!: string | null;
  @Column('uuid', { name: 'mark_id', nullable: true }) markId!: string | null;
  @Column('text') caption!: string;
  @Column('date', { name: 'taken_on', nullable: true }) takenOn!: string | null;
  @Column('text') state!: 'waiting' | 'ready' | 'refused';
  @Column('text', { nullable: true }) refusal!: string | null;
  @Column('int', { name: 'width_px', nullable: true }) widthPx!: number | null;
  @Column('int', { name: 'height_px', nullable: true }) heightPx!: number | null;
  @Column('bytea') sha256!: Buffer;
  @Column('uuid', { name: 'added_by' }) addedBy!: string;
  @Column('timestamptz', { name: 'added_at' }) addedAt!: Date;
}
