import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('cast_import')
export class CastImport {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'visit_id' }) visitId!: string;
  @Column('text') filename!: string;
  @Column('bytea') sha256!: Buffer;
  @Column('int') rows!: number;
  @Column('uuid', { name: 'imported_by' }) importedBy!: string;
  @Column('timestamptz', { name: 'imported_at' }) importedAt!: Date;
}
