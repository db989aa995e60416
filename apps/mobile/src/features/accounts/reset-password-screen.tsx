import { useState } from 'react';
import { NewPassword } from '@mereward/shared/accounts/contract';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { resetPassword } from '@/features/accounts/api';
import { useQueryText } from '@/features/accounts/next-page';
import { useDraftForm } from '@/hooks/use-draft-form';

const Chosen = z.strictObject({ password: NewPassword });

/** Where the mailed link leads: choose a new password. */
export function ResetPasswordScreen() {
  const token = useQueryText('token');
  const [done, setDone] = useState(false);
  const form = useDraftForm({
    form: 'reset-password',
    schema: Chosen,
    start: { password: '' },
    leaveOut: ['password'],
    send: ({ password }) => resetPassword({ token, password }),
    onDone: () => setDone(true),
  });
  return (
    <Page title="Choose a new password">
      {done ? (
        <>
          <Note kind="fine" title="Your new password holds" live>
            Every device is signed out. Sign in with the new one.
          </Note>
          <LinkButton label="Sign in" href="/sign-in" kind="main" />
        </>
      ) : token === '' ? (
        <>
          <Note kind="caution" title="The link is not whole">
            Open it from the mail again, or ask for a new one.
          </Note>
          <LinkButton label="Ask for a new link" href="/forgotten" />
        </>
      ) : (
        <DraftFormFrame
          form={form}
          label="Choose a new password"
          act="Use this password"
          busyLabel="Setting it…"
        >
          <FormField
            control={form.control}
            name="password"
            label="New password"
            hint="At least 12 characters. Every device is signed out when you set it."
            secret
            autoComplete="new-password"
          />
        </DraftFormFrame>
      )}
    </Page>
  );
}
