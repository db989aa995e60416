import { Column, Entity, PrimaryColumn } from 'typeorm';

/** Pegs kept back by the fishery: for a match, a private day. */
@Entity('peg_block')
export class PegBlock {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('text') title!: string;
  @Column('tstzrange') during!: string;
  @Column('uuid', { name: 'made_by' }) madeBy!: string;
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;
}
