import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A file of a log as it was brought, packed. */
@Entity('sounding_file')
export class SoundingFile {
  @PrimaryColumn('uuid', { name: 'import_id' }) importId!: string;
  @PrimaryColumn('int') seq!: number;
  @Column('text') name!: string;
  @Column('int') bytes!: number;
  @Column('bytea') packed!: Buffer;
}
