import type { ChangeWeight, Rule } from '@mereward/shared/rules/contract';
import type { RuleChange } from '@mereward/shared/rules/rule-changes';
import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A fishery's numbered rules in one version; a published one is frozen by the database. */
@Entity('rule_sheet')
export class RuleSheet {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('int', { nullable: true }) major!: number | null;
  @Column('int', { nullable: true }) minor!: number | null;
  @Column('text') status!: 'draft' | 'published';
  @Column('jsonb') rules!: Rule[];
  @Column('text', { nullable: true }) weight!: ChangeWeight | null;
  @Column('jsonb', { nullable: true }) changes!: RuleChange[] | null;
  @Column('uuid', { name: 'made_by' }) madeBy!: string;
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;
  @Column('uuid', { name: 'published_by', nullable: true }) publishedBy!: string | null;
  @Column('timestamptz', { name: 'published_at', nullable: true }) publishedAt!: Date | null;
  @Column('int') version!: number;
}
