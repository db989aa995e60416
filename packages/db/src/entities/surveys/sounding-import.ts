import type { LogOptions, LogPreview, LogReport, LogState } from '@mereward/shared/surveys/log-contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('sounding_import')
export class SoundingImport {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'visit_id' }) visitId!: string;
  @Column('text', { array: true }) filenames!: string[];
  @Column('bytea') sha256!: Buffer;
  @Column('jsonb') options!: LogOptions;
  @Column('text') goal!: 'look' | 'keep';
  @Column('uuid') attempt!: string;
  @Column('text') state!: LogState;
  @Column('text') step!: string;
  @Column('double precision') share!: number;
  @Column('text', { nullable: true }) error!: string | null;
  @Column('timestamptz', { name: 'cancel_asked_at', nullable: true }) cancelAskedAt!: Date | null;
  @Column('int', { default: 0 }) tries!: number; // runs begun since it was last asked for
  @Column('timestamptz', { name: 'updated_at' }) updatedAt!: Date;
  @Column('jsonb', { nullable: true }) preview!: LogPreview | null;
  @Column('jsonb', { nullable: true }) report!: LogReport | null;
  @Column('uuid', { name: 'imported_by' }) importedBy!: string;
  @Column('timestamptz', { name: 'imported_at' }) importedAt!: Date;
  @Column('timestamptz', { name: 'undone_at', nullable: true }) undoneAt!: Date | null;
}
