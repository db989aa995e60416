import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Kept } from '@/components/kept';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { sendVerificationAgain } from '@/features/accounts/api';

/** Has the link to confirm an address mailed once more. */
export function SendAgain({ email }: { email: string }) {
  const sending = useMutation({ mutationFn: () => sendVerificationAgain(email.trim()) });
  return (
    <View style={{ gap: space.small, alignItems: 'flex-start' }}>
      <Button
        label="Send the link again"
        busy={sending.isPending}
        busyLabel="Sending…"
        onPress={() => sending.mutate()}
      />
      <Kept
        words={
          sending.isSuccess ? `If ${email} still waits to be confirmed, a new link is on its way.` : null
        }
      />
      <ProblemNote problem={sending.error} />
    </View>
  );
}
