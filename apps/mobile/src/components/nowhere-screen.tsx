import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Page } from '@/components/page';

/** For an address that leads nowhere. */
export function NowhereScreen() {
  return (
    <Page title="No such page">
      <Empty
        title="Nothing is at this address"
        action={<LinkButton label="To the water" href="/water" kind="main" />}
      >
        It may have been moved, or a letter of the address is wrong. Every lake and peg can be found from the
        water.
      </Empty>
    </Page>
  );
}
