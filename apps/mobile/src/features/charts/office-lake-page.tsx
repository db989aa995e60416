import type { ReactNode } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { useLake } from '@/features/lakes/api';

type Props = {
  title: string;
  /** What the reader must be allowed to do at the lake to see the page's content. */
  may: 'change' | 'changePegs';
  children: (lake: LakeView) => ReactNode;
};

const WHO = {
  change: 'The owner or a manager changes this.',
  changePegs: 'The owner, a manager or the head bailiff changes this.',
} as const;

/** A page about something of one lake, for those who keep it. The API decides; this only spares a vain form. */
export function OfficeLakePage({ title, may, children }: Props) {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  const name = lake.data?.details.name;
  return (
    <Page
      title={title}
      {...(name === undefined ? {} : { over: name })}
      back={{ label: name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) => (value.may[may] ? children(value) : <Note title="Not yours to change">{WHO[may]}</Note>)}
      </Loaded>
    </Page>
  );
}
