import { useState } from 'react';
import { AskReset } from '@mereward/shared/accounts/contract';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { askReset } from '@/features/accounts/api';
import { useDraftForm } from '@/hooks/use-draft-form';

/** Ask for a link to choose a new password. */
export function ForgottenScreen() {
  const [askedFor, setAskedFor] = useState<string | null>(null);
  const form = useDraftForm({
    form: 'forgotten',
    schema: AskReset,
    start: { email: '' },
    send: async (input: AskReset) => {
      await askReset(input);
      return input.email;
    },
    onDone: setAskedFor,
  });
  return (
    <Page title="Choose a new password" back={{ label: 'Sign in', href: '/sign-in' }}>
      {askedFor === null ? (
        <DraftFormFrame form={form} label="Ask for a link" act="Send me a link" busyLabel="Sending…">
          <FormField
            control={form.control}
            name="email"
            label="E-mail"
            hint="The address you signed up with."
            keypad="email"
            autoComplete="username"
          />
        </DraftFormFrame>
      ) : (
        <Note kind="fine" title="Look in your mail" live>
          {`If ${askedFor} has an account, a link to choose a new password is on its way. It works once, for one hour.`}
        </Note>
      )}
    </Page>
  );
}
