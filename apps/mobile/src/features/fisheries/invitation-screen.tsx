import type { InvitationShown } from '@mereward/shared/fisheries/contract';
import { usePathname } from 'expo-router';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useAcceptInvitation, useInvitation } from '@/features/fisheries/invitation-api';
import { useQueryText } from '@/features/accounts/next-page';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import { useSession } from '@/lib/session';

/** Where a mailed invitation leads: see what it is to, and take it up. */
export function InvitationScreen() {
  const token = useQueryText('token');
  const invitation = useInvitation(token);
  return (
    <Page title="An invitation">
      {token === '' ? (
        <Note kind="caution" title="The link is not whole">
          Open it from the mail again, or copy all of it into the address bar.
        </Note>
      ) : (
        <Loaded query={invitation} waiting="Reading the invitation…">
          {(shown) => <Shown invitation={shown} token={token} />}
        </Loaded>
      )}
    </Page>
  );
}

function Shown({ invitation, token }: { invitation: InvitationShown; token: string }) {
  const { account } = useSession();
  const accepting = useAcceptInvitation();
  const { fisheryName, role, email } = invitation;
  if (accepting.isSuccess)
    return (
      <>
        <Note kind="fine" title={`You are ${ROLE_WORDS[role]} at ${fisheryName}`} live>
          What the role opens is among the places now.
        </Note>
        <LinkButton label="To the water" href="/water" kind="main" />
      </>
    );
  return (
    <View style={{ gap: space.page }}>
      <Text size="lead">{`${fisheryName} invites ${email} as ${ROLE_WORDS[role]}.`}</Text>
      {account === null ? (
        <SignInFirst email={email} token={token} />
      ) : (
        <>
          <Text tone="inkSoft">{`You are signed in as ${account.email}.`}</Text>
          <View style={{ alignItems: 'flex-start' }}>
            <Button
              label="Take it up"
              kind="main"
              busy={accepting.isPending}
              busyLabel="Taking it up…"
              onPress={() => accepting.mutate(token)}
            />
          </View>
        </>
      )}
      <ProblemNote problem={accepting.error} />
    </View>
  );
}

function SignInFirst({ email, token }: { email: string; token: string }) {
  const back = encodeURIComponent(`${usePathname()}?token=${encodeURIComponent(token)}`);
  return (
    <>
      <Text>
        Sign in with that address to take it up, or make an account with it and open this link again.
      </Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <LinkButton label="Sign in" href={`/sign-in?next=${back}`} kind="main" />
        <LinkButton label="Make an account" href={`/sign-up?email=${encodeURIComponent(email)}`} />
      </View>
    </>
  );
}
