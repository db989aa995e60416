import type { ClosureView } from '@mereward/shared/closures/deeds-contract';
import { View } from 'react-native';
import { Disclosure } from '@/components/disclosure';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { useClosures } from '@/features/closures/api';
import { EFFECTS, scopeWords, tallyFacts, timesWords } from '@/features/closures/closure-words';
import { LiftPart } from '@/features/closures/lift-part';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';

/** What is closed, was and will be, with what became of the bookings. */
export function ClosuresScreen() {
  const fishery = useChosenFishery(['owner', 'manager', 'head_bailiff', 'office']);
  return (
    <Page title="Closures" back={{ label: 'Office', href: '/office' }}>
      <ChosenFishery
        {...fishery}
        none={
          <Empty title="No fishery">The owner, a manager, the office or the head bailiff closes water.</Empty>
        }
      >
        {(fisheryId) => <Closures fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Closures({ fisheryId }: { fisheryId: string }) {
  const closures = useClosures(fisheryId);
  return (
    <Loaded query={closures} waiting="Reading the closures…">
      {({ closures: all, may }) => {
        const now = all.filter(({ state }) => state !== 'over');
        const over = all.filter(({ state }) => state === 'over');
        return (
          <>
            {may.close ? (
              <View style={{ alignItems: 'flex-start' }}>
                <LinkButton
                  label="Close water"
                  href={`/office/closures/new?fisheryId=${fisheryId}`}
                  kind="main"
                />
              </View>
            ) : null}
            {now.length === 0 ? (
              <Empty title="Everything is open">
                Closing water tells its visitors, and finds a place for every booking in the way.
              </Empty>
            ) : null}
            {now.map((closure) => (
              <One key={closure.id} closure={closure} />
            ))}
            {over.length > 0 ? (
              <Disclosure title={`Over (${String(over.length)})`}>
                {over.map((closure) => (
                  <One key={closure.id} closure={closure} />
                ))}
              </Disclosure>
            ) : null}
          </>
        );
      }}
    </Loaded>
  );
}

const STATES = {
  to_come: { shape: 'diamond', tone: 'amber', word: 'to come' },
  in_force: { shape: 'cross', tone: 'brick', word: 'closed' },
  over: { shape: 'bar', tone: 'inkSoft', word: 'over' },
} as const;

function One({ closure }: { closure: ClosureView }) {
  const { state, reasonWords, details, effect, tally, lift } = closure;
  return (
    <Section
      title={`${scopeWords(closure)}: ${reasonWords.toLowerCase()}`}
      end={<StatusShape {...STATES[state]} size="small" />}
    >
      <Text>{details.publicWords}</Text>
      <Text tone="inkSoft">{`${timesWords(closure)} · ${EFFECTS[effect].label}`}</Text>
      {tally ? <Facts facts={tallyFacts(tally)} /> : null}
      {lift?.reason ? <Text tone="inkSoft">{`Lifted all the same: ${lift.reason}`}</Text> : null}
      {state === 'over' ? null : <LiftPart closure={closure} />}
    </Section>
  );
}
