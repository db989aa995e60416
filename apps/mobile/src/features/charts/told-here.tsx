import { Section } from '@/components/section';
import { useSession } from '@/lib/session';
import { useMyDisagreements } from './disagreement-api';
import { MyDisagreements } from './my-disagreements';

/** What became of what the reader told of this peg; nothing where nothing was told. */
export function ToldHere({ pegId, bare = false }: { pegId: string; bare?: boolean }) {
  const { account } = useSession();
  const mine = useMyDisagreements(account !== null);
  const told = (mine.data?.disagreements ?? []).filter((each) => each.pegId === pegId);
  if (told.length === 0) return null;
  return (
    <Section title="What you told of this peg" bare={bare}>
      <MyDisagreements label="What you told of this peg" disagreements={told} />
    </Section>
  );
}
