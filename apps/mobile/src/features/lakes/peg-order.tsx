import { useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { List, Row } from '@/components/list';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { useOrderPegs } from '@/features/lakes/office-api';

/** A list with one thing moved by a step, earlier or later. */
function moved(ids: readonly string[], at: number, by: -1 | 1): string[] {
  const next = [...ids];
  const [one] = next.splice(at, 1);
  if (one !== undefined) next.splice(at + by, 0, one);
  return next;
}

/** Puts the pegs into the order in which they are walked. */
export function PegOrder({ lake, onDone }: { lake: LakeView; onDone: () => void }) {
  const [ids, setIds] = useState(() => lake.pegs.map(({ id }) => id));
  const order = useOrderPegs(lake.id);
  const numberOf = (id: string): string => lake.pegs.find((peg) => peg.id === id)?.number ?? '';
  return (
    <View style={{ gap: space.medium }}>
      <List label="Pegs in the order they are walked">
        {ids.map((id, at) => (
          <Row
            key={id}
            title={`${String(at + 1)}. Peg ${numberOf(id)}`}
            end={
              <View style={{ flexDirection: 'row', gap: space.small }}>
                <Button
                  label="↑"
                  spoken={`Walk peg ${numberOf(id)} earlier`}
                  disabled={at === 0}
                  onPress={() => setIds(moved(ids, at, -1))}
                />
                <Button
                  label="↓"
                  spoken={`Walk peg ${numberOf(id)} later`}
                  disabled={at === ids.length - 1}
                  onPress={() => setIds(moved(ids, at, 1))}
                />
              </View>
            }
          />
        ))}
      </List>
      <ProblemNote problem={order.error} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label="Keep this order"
          kind="main"
          busy={order.isPending}
          busyLabel="Keeping…"
          onPress={() => order.mutate({ pegIds: ids }, { onSuccess: onDone })}
        />
        <Button label="Leave it" onPress={onDone} />
      </View>
    </View>
  );
}
