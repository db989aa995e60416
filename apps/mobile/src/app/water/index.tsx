import { Empty } from '@/components/empty';
import { Page } from '@/components/page';

export default function WaterPlace() {
  return (
    <Page title="Water">
      <Empty title="No lakes are shown here yet">
        Lakes, their charts and pegs appear here once a fishery has published them.
      </Empty>
    </Page>
  );
}
