import { View } from 'react-native';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Waiting } from '@/components/waiting';
import { ChoiceGrid } from '@/components/choice-grid';
import { Text } from '@/components/text';
import { DetailsForm } from '@/features/accounts/details-form';
import { DeviceUnits } from '@/features/accounts/device-units';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import { SignOutSection } from '@/features/accounts/sign-out-section';
import { themeChoice } from '@/hooks/use-theme';
import { useSession } from '@/lib/session';

const themes = [
  { key: 'device', label: 'As this device' },
  { key: 'light', label: 'Light' },
  { key: 'dusk', label: 'Dusk' },
] as const;

/** Who is here, how they like things shown, and the way out. */
export function MeScreen() {
  const { state, account } = useSession();
  return (
    <Page title="Me" {...(account ? { under: account.email } : {})}>
      {account === null && state === 'unknown' ? <Waiting words="Seeing who is here…" /> : null}
      {account === null && state === 'stranger' ? <Stranger /> : null}
      {account === null ? null : <DetailsForm key={account.id} account={account} />}
      {account === null || account.roles.length === 0 ? null : (
        <Section title="What I do where">
          <Facts
            facts={account.roles.map(({ fisheryName, role }) => ({
              term: fisheryName,
              fact: ROLE_WORDS[role],
            }))}
          />
        </Section>
      )}
      <Section title="On this device">
        <ChoiceGrid
          label="Paper"
          hint="Dusk is dark paper for a dark bank."
          choices={themes}
          value={themeChoice.use()}
          onChange={themeChoice.set}
          bank={false}
        />
        {account === null ? <DeviceUnits /> : null}
      </Section>
      {account === null ? null : (
        <Section
          title="Do you run a water?"
          note="Whoever owns or runs one makes its fishery here, draws its lakes and invites the others."
        >
          <View style={{ alignItems: 'flex-start' }}>
            <LinkButton label="Make a fishery" href="/me/fishery" />
          </View>
        </Section>
      )}
      {account === null ? null : <SignOutSection />}
    </Page>
  );
}

function Stranger() {
  return (
    <Section title="Nobody is signed in here" bare>
      <Text>
        Lakes, charts and peg pages can be read without an account. To book a peg or to work here, sign in.
      </Text>
      <LinkButton label="Sign in" href="/sign-in?next=/me" kind="main" />
      <LinkButton label="Make an account" href="/sign-up" />
    </Section>
  );
}
