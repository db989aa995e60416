import { useState } from 'react';
import { useRouter } from 'expo-router';
import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { CloseForm } from '@/features/closures/close-form';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';

/** Closes water, showing first what it would hit. */
export function CloseScreen() {
  const fishery = useChosenFishery(['owner', 'manager', 'head_bailiff', 'office']);
  return (
    <Page title="Close water" back={{ label: 'Closures', href: '/office/closures' }}>
      <ChosenFishery
        {...fishery}
        none={
          <Empty title="No fishery">The owner, a manager, the office or the head bailiff closes water.</Empty>
        }
      >
        {(fisheryId) => <Close fisheryId={fisheryId} lakes={fishery.chosen?.lakes ?? []} />}
      </ChosenFishery>
    </Page>
  );
}

type Ground = { fisheryId: string; lakes: readonly { id: string; name: string }[] };

function Close({ fisheryId, lakes }: Ground) {
  const fishery = useFishery(fisheryId);
  const router = useRouter();
  const [nowMs] = useState(() => Date.now());
  return (
    <Loaded query={fishery} waiting="Reading the fishery…">
      {({ details: { zone } }) => (
        <CloseForm
          fisheryId={fisheryId}
          lakes={lakes}
          zone={zone}
          nowMs={nowMs}
          onDone={() => router.replace(`/office/closures?fisheryId=${fisheryId}`)}
        />
      )}
    </Loaded>
  );
}
