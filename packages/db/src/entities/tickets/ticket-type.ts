import type { TicketType as TicketTypeDetails } from '@mereward/shared/tickets/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('ticket_type')
export class TicketType {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('jsonb') details!: TicketTypeDetails;
  @Column('int') version!: number;
  @Column('timestamptz', { name: 'withdrawn_at', nullable: true }) withdrawnAt!: Date | null;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
