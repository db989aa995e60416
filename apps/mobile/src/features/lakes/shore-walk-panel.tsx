import { useState } from 'react';
import { POOREST_FIX_M, walkReport, type ShoreWalk } from '@mereward/shared/lakes/shore-walk';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Note } from '@/components/note';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { ShoreWalking, WalkOf } from '@/features/lakes/use-shore-walk';
import {
  gapWords,
  leftOutWords,
  surenessWords,
  troubleWords,
  WALK_CAUTION,
} from '@/features/lakes/walk-words';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';
import type { DevicePosition } from '@/lib/watched-position';

const GOOD_M = 6;
const AT_START_M = 15;

type Props = {
  walking: ShoreWalking;
  /** A shore stands already: a walk takes its place, or goes round an island. */
  hasShore: boolean;
  onClose: () => void;
};

/** Walks the shore with this phone: the caution, how the walk goes, and closing the ring. */
export function ShoreWalkPanel({ walking, hasShore, onClose }: Props) {
  const [asked, setAsked] = useState<WalkOf | null>(null);
  if (walking.walk) return <UnderWay walking={walking} walk={walking.walk} onClose={onClose} />;
  if (asked === null)
    return (
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label={hasShore ? 'Walk the shore anew' : 'Walk the shore'}
          onPress={() => setAsked('shore')}
        />
        {hasShore ? <Button label="Walk round an island" onPress={() => setAsked('island')} /> : null}
      </View>
    );
  const start = (): void => {
    walking.start(asked);
    setAsked(null);
  };
  return (
    <View style={{ gap: space.medium }}>
      <Note kind="caution" title="Before you walk">
        {WALK_CAUTION}
      </Note>
      <Text>
        {`Go once round ${asked === 'shore' ? 'the water’s edge' : 'the island’s edge'}, and keep this page open with the screen on: a phone in a pocket stops listening. ${
          hasShore && asked === 'shore' ? 'The shore drawn here stays until you close the ring.' : ''
        }`}
      </Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button label="Start walking" kind="main" bank onPress={start} />
        <Button label="Leave it" bank onPress={() => setAsked(null)} />
      </View>
    </View>
  );
}

type UnderWayProps = { walking: ShoreWalking; walk: ShoreWalk; onClose: () => void };

function UnderWay({ walking, walk, onClose }: UnderWayProps) {
  const units = useUnits();
  const [leaving, setLeaving] = useState(false);
  const { listening, restored, trouble, newest, of } = walking;
  const { walkedM, toStartM, fixes } = walkReport(walk);
  const mayClose = walk.stations.length >= 3;
  const troubled = trouble ? troubleWords(trouble) : null;
  return (
    <View style={{ gap: space.medium }}>
      <View style={{ gap: space.small }}>
        <Accuracy newest={newest} listening={listening} />
        <Text weight="semibold" size="lead">
          {`Walked ${length(walkedM, units, 0)}`}
        </Text>
        <Text>
          {fixes === 0
            ? 'Stand still until the first fix has come.'
            : `${String(fixes)} fixes; ${length(toStartM, units, 0)} from the start.`}
        </Text>
        {[gapWords(walk, units), leftOutWords(walk, units)].map((words) =>
          words ? <Text key={words}>{words}</Text> : null,
        )}
      </View>
      {restored && !listening ? (
        <Note title="The walk is kept">
          It was laid aside when this page was left. Go back to where you stopped, then press “Go on”.
        </Note>
      ) : null}
      {troubled ? (
        <Note kind="danger" title={troubled.title} live>
          {troubled.words}
        </Note>
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {listening ? (
          <Button label="Pause" bank onPress={walking.pause} />
        ) : (
          <Button
            label="Go on"
            kind={mayClose && toStartM < AT_START_M ? 'plain' : 'main'}
            bank
            onPress={walking.goOn}
          />
        )}
        <Button
          label="Close the walked ring"
          kind={mayClose && toStartM < AT_START_M && walkedM > AT_START_M ? 'main' : 'plain'}
          bank
          disabled={!mayClose}
          onPress={onClose}
        />
        <Button label="Throw this walk away" kind="danger" bank onPress={() => setLeaving(true)} />
      </View>
      <Text tone="inkSoft">{surenessWords(walk, units) ?? WALK_CAUTION}</Text>
      <Confirm
        open={leaving}
        title="Throw this walk away?"
        words={`${length(walkedM, units, 0)} round ${of === 'shore' ? 'the shore' : 'an island'} are forgotten. What is drawn here stays. It can’t be brought back.`}
        act="Throw it away"
        danger
        onAct={() => {
          setLeaving(false);
          walking.end();
        }}
        onClose={() => setLeaving(false)}
      />
    </View>
  );
}

function Accuracy({ newest, listening }: { newest: DevicePosition | null; listening: boolean }) {
  const units = useUnits();
  if (!listening) return <StatusShape shape="dot" tone="inkSoft" word="paused: not listening" />;
  if (!newest) return <StatusShape shape="dot" tone="water" word="waiting for the first fix" />;
  const within = `within ${length(newest.accuracyM, units, 0)}`;
  if (newest.accuracyM > POOREST_FIX_M)
    return <StatusShape shape="cross" tone="brick" word={`${within}: too poor, left out`} />;
  if (newest.accuracyM > GOOD_M) return <StatusShape shape="diamond" tone="amber" word={`${within}: fair`} />;
  return <StatusShape shape="triangle" tone="reed" word={`${within}: good`} />;
}
