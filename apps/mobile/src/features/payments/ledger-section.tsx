import { Facts } from '@/components/facts';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { useLedger } from '@/features/payments/api';
import { money } from '@/lib/format';

/** What stands on each account now; all together they come to nought. */
export function LedgerSection({ fisheryId }: { fisheryId: string }) {
  const ledger = useLedger(fisheryId);
  return (
    <Section
      title="Ledger"
      note="Money the fishery has or is owed stands above nought; what it has sold and what it owes below."
    >
      <Loaded query={ledger} waiting="Reading the ledger…">
        {({ accounts, sumPence, currency }) => (
          <>
            <Facts
              facts={accounts.map(({ words, amountPence }) => ({
                term: words,
                fact: money(amountPence, currency),
              }))}
            />
            <StatusShape
              shape={sumPence === 0 ? 'triangle' : 'cross'}
              tone={sumPence === 0 ? 'reed' : 'brick'}
              word={
                sumPence === 0
                  ? 'The ledger balances: all accounts come to nought.'
                  : `The ledger is out by ${money(sumPence, currency)}: tell whoever keeps Mereward.`
              }
            />
          </>
        )}
      </Loaded>
    </Section>
  );
}
