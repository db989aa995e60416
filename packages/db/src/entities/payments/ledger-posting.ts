import { Column, Entity, PrimaryColumn } from 'typeorm';

/** Debits are positive, credits negative, in the currency's minor unit. */
@Entity('ledger_posting')
export class LedgerPosting {
  @PrimaryColumn('bigint', { generated: 'identity', generatedIdentity: 'ALWAYS' }) id!: string;
  @Column('uuid', { name: 'deed_id' }) deedId!: string;
  @Column('text') account!: string;
  @Column('bigint', { name: 'amount_pence' }) amountPence!: string;
  @Column('text') currency!: string;
  @Column('jsonb') tags!: Record<string, string>; // lake, ticket type, method, VAT rate: what takings are grouped by
}
