import { Empty } from '@/components/empty';
import { Page } from '@/components/page';

export default function BankPlace() {
  return (
    <Page title="Bank">
      <Empty title="Nothing to do on the bank yet">
        Survey visits and casts appear here once a lake is drawn and has pegs.
      </Empty>
    </Page>
  );
}
