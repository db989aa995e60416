import { Slot } from 'expo-router';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Page } from '@/components/page';
import { Waiting } from '@/components/waiting';
import { placesFor, type Place } from '@/constants/places';
import { useSession } from '@/lib/session';

/** Lets in those whose role opens the place, and tells the others why not. A courtesy: the API decides. */
function PlaceGate({ place, title }: { place: Place['key']; title: string }) {
  const { state, account, roles } = useSession();
  if (placesFor(roles).some(({ key }) => key === place)) return <Slot />;
  if (state === 'unknown' && account === null)
    return (
      <Page title={title}>
        <Waiting words="Seeing who is here…" />
      </Page>
    );
  return (
    <Page title={title}>
      {account === null ? (
        <Empty title="Sign in first" action={<LinkButton label="Sign in" href="/sign-in" kind="main" />}>
          {`${title} is for the fishery’s own people.`}
        </Empty>
      ) : (
        <Empty title="Not open to you" action={<LinkButton label="To the water" href="/water" kind="main" />}>
          {`${title} is for the fishery’s own people. If you work here, ask the owner or manager to give you your role.`}
        </Empty>
      )}
    </Page>
  );
}

export const BankGate = () => <PlaceGate place="bank" title="Bank" />;
export const OfficeGate = () => <PlaceGate place="office" title="Office" />;
