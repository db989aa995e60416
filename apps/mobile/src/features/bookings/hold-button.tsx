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
type Hold = ReturnType<typeof useHold>;

/** The one main act of the search. Whoever is not signed in is sent there first, and back to the same choice. */
export function HoldButton(props: Props) {
  const hold = useHold(props.choice);
  return (
    <>
      <HoldFault hold={hold} />
      <HoldAct {...props} hold={hold} />
    </>
  );
}

/** The act alone, for whoever shows its outcome elsewhere: the peg may be gone, and the act with it. */
export function HoldAct({ label, choice, holding, hold }: Props & { hold: Hold }) {
  const { account } = useSession();
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
  return (
    <>
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

/** Why the peg could not be held; that somebody was quicker is no fault of anybody's. */
export function HoldFault({ hold: { error } }: { hold: Hold }) {
  if (!(error instanceof Problem) || error.kind !== 'conflict') return <ProblemNote problem={error} />;
  const words = [error.detail ?? '', ...error.errors.map(({ detail }) => detail)];
  return (
    <Note kind="caution" title={error.title} live>
      {words
        .filter((each, i) => each !== '' && words.indexOf(each) === i)
        .map((each) => (
          <Text key={each}>{each}</Text>
        ))}
    </Note>
  );
}
