import { Fragment, type ReactElement, type ReactNode } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { Role } from '@mereward/shared/accounts/contract';
import { Loaded } from '@/components/loaded';
import { Select } from '@/components/select';
import { useMyFisheries } from '@/features/fisheries/use-my-fisheries';

/** The fishery a screen is about: the one its address names (`?fisheryId=`), else the first where one of the roles is held. */
export function useChosenFishery(roles: readonly Role[]) {
  const { fisheryId } = useLocalSearchParams<{ fisheryId?: string }>();
  const { all, mine } = useMyFisheries(roles);
  return { all, mine, chosen: mine.find(({ id }) => id === fisheryId) ?? mine[0] };
}

type Props = ReturnType<typeof useChosenFishery> & {
  /** What is shown to somebody who holds none of the roles anywhere. */
  none: ReactElement;
  /** On a screen of the bank. */
  bank?: boolean | undefined;
  children: (fisheryId: string) => ReactNode;
};

/** What is shown of the chosen fishery, under the choice between several. */
export function ChosenFishery({ all, mine, chosen, none, bank, children }: Props) {
  const router = useRouter();
  return (
    <Loaded
      query={all}
      waiting="Reading the fishery…"
      empty={{ when: () => chosen === undefined, show: none }}
    >
      {() => (
        <>
          {mine.length > 1 ? (
            <Select
              label="Which fishery"
              choices={mine.map(({ id, name }) => ({ key: id, label: name }))}
              value={chosen?.id ?? null}
              onChange={(id) => router.setParams({ fisheryId: id })}
              bank={bank}
            />
          ) : null}
          {chosen ? <Fragment key={chosen.id}>{children(chosen.id)}</Fragment> : null}
        </>
      )}
    </Loaded>
  );
}
