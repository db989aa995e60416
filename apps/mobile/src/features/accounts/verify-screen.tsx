import { useEffect } from 'react';
import { useMutation } from '@tanstack/react-query';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Waiting } from '@/components/waiting';
import { verifyEmail } from '@/features/accounts/api';
import { useQueryText } from '@/features/accounts/next-page';

/** Where the mailed link leads: the address is confirmed. */
export function VerifyScreen() {
  const token = useQueryText('token');
  const { mutate, isPending, isSuccess, error } = useMutation({ mutationFn: verifyEmail });
  useEffect(() => {
    if (token !== '') mutate(token);
  }, [token, mutate]);
  return (
    <Page title="Confirm your address">
      {token === '' ? (
        <Note kind="caution" title="The link is not whole">
          Open it from the mail again, or copy all of it into the address bar.
        </Note>
      ) : null}
      {isPending ? <Waiting words="Confirming your address…" /> : null}
      {isSuccess ? (
        <>
          <Note kind="fine" title="Your address is confirmed" live>
            You can sign in now.
          </Note>
          <LinkButton label="Sign in" href="/sign-in" kind="main" />
        </>
      ) : null}
      <ProblemNote problem={error} onRetry={() => mutate(token)} />
      {error ? <LinkButton label="Sign in to have a new link sent" href="/sign-in" /> : null}
    </Page>
  );
}
