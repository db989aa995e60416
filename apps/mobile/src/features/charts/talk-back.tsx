import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';

type Props = { pegId: string; spotId: string | null };

/** The way to say that it isn't like that. */
export function TalkBack({ pegId, spotId }: Props) {
  const at = spotId === null ? '' : `?spot=${spotId}`;
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <LinkButton label="It isn’t like that" href={`/water/pegs/${pegId}/disagree${at}`} kind="quiet" />
    </View>
  );
}
