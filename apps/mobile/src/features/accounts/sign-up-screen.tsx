import { useState } from 'react';
import { SignUp } from '@mereward/shared/accounts/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { signUp } from '@/features/accounts/api';
import { useQueryText } from '@/features/accounts/next-page';
import { SendAgain } from '@/features/accounts/send-again';
import { useDraftForm } from '@/hooks/use-draft-form';

/** Make an account; a mailed link confirms the address. */
export function SignUpScreen() {
  const [mailedTo, setMailedTo] = useState<string | null>(null);
  const form = useDraftForm({
    form: 'sign-up',
    schema: SignUp,
    start: { name: '', email: useQueryText('email'), password: '' },
    leaveOut: ['password'],
    send: async (input: SignUp) => {
      await signUp(input);
      return input.email;
    },
    onDone: setMailedTo,
  });
  if (mailedTo !== null) return <LookInYourMail email={mailedTo} onWrong={() => setMailedTo(null)} />;
  return (
    <Page title="Make an account" back={{ label: 'Sign in', href: '/sign-in' }}>
      <DraftFormFrame form={form} label="Make an account" act="Make the account" busyLabel="Making it…">
        <FormField
          control={form.control}
          name="name"
          label="Name"
          hint="As a bailiff on the bank should know you."
          autoComplete="name"
        />
        <FormField control={form.control} name="email" label="E-mail" keypad="email" autoComplete="email" />
        <FormField
          control={form.control}
          name="password"
          label="Password"
          hint="At least 12 characters. Four words in a row are easy to keep in mind."
          secret
          autoComplete="new-password"
        />
      </DraftFormFrame>
    </Page>
  );
}

function LookInYourMail({ email, onWrong }: { email: string; onWrong: () => void }) {
  return (
    <Page title="Look in your mail" back={{ label: 'Sign in', href: '/sign-in' }}>
      <Note kind="fine" title={`A mail is on its way to ${email}`} live>
        Open the link in it to confirm that the address is yours; it works for 24 hours. Then you can sign in.
      </Note>
      <Text>Nothing there? Look among the unwanted mail first, and see that the address is right.</Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'flex-start' }}>
        <SendAgain email={email} />
        <Button label="The address is wrong" kind="quiet" onPress={onWrong} />
      </View>
    </Page>
  );
}
