import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('level_reading')
export class LevelReading {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'board_id' }) boardId!: string;
  @Column('timestamptz') at!: Date;
  @Column('double precision', { name: 'level_m' }) levelM!: number;
  @Column('text', { name: 'level_text' }) levelText!: string;
  @Column('text') note!: string;
  @Column('uuid', { name: 'recorded_by' }) recordedBy!: string;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
}
