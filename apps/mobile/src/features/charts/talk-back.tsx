import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { useSession } from '@/lib/session';
import { useMyDisagreements } from './disagreement-api';
import { MyDisagreements } from './my-disagreements';

type Props = { pegId: string; spotId: string | null };

/** The way to say that it isn't like that, and what became of what the reader said of this peg before. */
export function TalkBack({ pegId, spotId }: Props) {
  const { account } = useSession();
  const mine = useMyDisagreements(account !== null);
  const told = (mine.data?.disagreements ?? []).filter((each) => each.pegId === pegId);
  const at = spotId === null ? '' : `?spot=${spotId}`;
  return (
    <View style={{ gap: space.page }}>
      <View style={{ alignItems: 'flex-start' }}>
        <LinkButton label="It isn’t like that" href={`/water/pegs/${pegId}/disagree${at}`} kind="quiet" />
      </View>
      {told.length > 0 ? (
        <Section title="What you told of this peg" bare>
          <MyDisagreements label="What you told of this peg" disagreements={told} />
        </Section>
      ) : null}
    </View>
  );
}
