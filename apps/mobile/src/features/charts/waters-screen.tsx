import { useLocalSearchParams } from 'expo-router';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { useLake } from '@/features/lakes/api';
import { useWaters } from './chart-answers-api';
import { WatersEditor } from './waters-editor';

/** Whose water is whose: the first partition, and what the fishery drew over it. */
export function WatersScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  const waters = useWaters(lakeId);
  return (
    <Page
      title="Pegs’ waters"
      width="wide"
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: lake.data?.details.name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(theLake) => (
          <Loaded query={waters} waiting="Parting the water among the pegs…">
            {(theWaters) => <WatersEditor lake={theLake} waters={theWaters} />}
          </Loaded>
        )}
      </Loaded>
    </Page>
  );
}
