import { SignIn } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { useRouter } from 'expo-router';
import { View } from 'react-native';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { Page } from '@/components/page';
import { Text } from '@/components/text';
import { TextLink } from '@/components/text-link';
import { space } from '@/constants/layout';
import { useNextPage, useQueryText } from '@/features/accounts/next-page';
import { SendAgain } from '@/features/accounts/send-again';
import { useDraftForm } from '@/hooks/use-draft-form';
import { signIn } from '@/lib/session';

/** Sign in, and go on to where one was headed. */
export function SignInScreen() {
  const router = useRouter();
  const next = useNextPage();
  const headed = useQueryText('next');
  const carried = headed === '' ? '' : `?next=${encodeURIComponent(headed)}`;
  const form = useDraftForm({
    form: 'sign-in',
    schema: SignIn,
    start: { email: '', password: '' },
    leaveOut: ['email', 'password'],
    send: signIn,
    onDone: () => router.replace(next),
  });
  const unconfirmed = form.problem instanceof Problem && form.problem.kind === 'forbidden';
  return (
    <Page title="Sign in" under="One sign-in works at every fishery.">
      <DraftFormFrame form={form} label="Sign in" act="Sign in" busyLabel="Signing in…">
        <FormField
          control={form.control}
          name="email"
          label="E-mail"
          keypad="email"
          autoComplete="username"
        />
        <FormField
          control={form.control}
          name="password"
          label="Password"
          secret
          autoComplete="current-password"
        />
      </DraftFormFrame>
      {unconfirmed ? <SendAgain email={form.getValues('email')} /> : null}
      <View style={{ gap: space.medium }}>
        <Text>
          No account yet? <TextLink href={`/sign-up${carried}`}>Make one</TextLink>
        </Text>
        <Text>
          Password gone? <TextLink href="/forgotten">Choose a new one</TextLink>
        </Text>
        <Text tone="inkSoft">Peg pages, charts and what is free can be read without an account.</Text>
      </View>
    </Page>
  );
}
