import { Linking } from 'react-native';
import { apiUrl } from '@/lib/api';

/** Opens the peg's public card in the phone's own reader. */
export async function openCard(pegId: string, _number: string): Promise<void> {
  await Linking.openURL(apiUrl(`/pegs/${pegId}/card.pdf`));
}
