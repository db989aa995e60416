import { Empty } from '@/components/empty';
import { Page } from '@/components/page';

export default function TicketsPlace() {
  return (
    <Page title="Tickets">
      <Empty title="Tickets are not sold here yet">
        Ask the fishery’s office or the bailiff on the bank for a ticket. What lies in front of each peg is
        under Water.
      </Empty>
    </Page>
  );
}
