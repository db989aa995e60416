import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { space } from '@/constants/layout';
import { WaterScreen } from '@/features/lakes/water-screen';
import { NoticesHere } from '@/features/notices/notices-here';

/** The front door with what each fishery tells its visitors now, and the way to its rules. */
export function WaterFrontScreen() {
  return (
    <WaterScreen
      told={(fisheryId) => (
        <View style={{ gap: space.small, alignItems: 'flex-start' }}>
          <NoticesHere fisheryId={fisheryId} />
          <LinkButton label="The rules here" href={`/water/rules/${fisheryId}`} kind="quiet" />
        </View>
      )}
    />
  );
}
