import { Empty } from '@/components/empty';
import { Page } from '@/components/page';

export default function OfficePlace() {
  return (
    <Page title="Office">
      <Empty title="Nothing in the office yet">
        Lakes, pegs, charts and people are kept here once the fishery is set up.
      </Empty>
    </Page>
  );
}
