import { Problem } from '@mereward/shared/problems/problem';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { findAddress, type FindChoice } from '@/features/bookings/find-choice';
import { useHold, type Holding } from '@/features/bookings/use-hold';
import { useSession } from '@/lib/session';

type Props = { label: string; choice: FindChoice; holding: Holding };

/** The one main act of the search. Whoever is not signed in is sent there first, and back to the same choice. */
export function HoldButton({ label, choice, holding }: Props) {
  const { account } = useSession();
  const hold = useHold(choice);
  if (account === null)
    return (
      <>
        <Text tone="inkSoft">To hold a peg, sign in or make an account. You come back to this choice.</Text>
        <LinkButton
          label="Sign in to hold it"
          href={`/sign-in?next=${encodeURIComponent(findAddress(choice))}`}
          kind="main"
        />
      </>
    );
  const taken = hold.error instanceof Problem && hold.error.kind === 'conflict' ? hold.error : null;
  return (
    <>
      {taken ? (
        <Note kind="caution" title={taken.title} live>
          {[taken.detail ?? '', ...taken.errors.map(({ detail }) => detail)]
            .filter((words, i, all) => words !== '' && all.indexOf(words) === i)
            .map((words) => (
              <Text key={words}>{words}</Text>
            ))}
        </Note>
      ) : (
        <ProblemNote problem={hold.error} />
      )}
      <Button
        label={label}
        kind="main"
        bank
        busy={hold.isPending}
        busyLabel="Holding…"
        onPress={() => hold.mutate(holding)}
      />
      <Text size="small" tone="inkSoft">
        It is held for ten minutes while you fill in the rest. Nothing is paid yet.
      </Text>
    </>
  );
}
