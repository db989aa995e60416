import { Linking } from 'react-native';
import { apiUrl } from '@/lib/api';

/** Opens a paper that is open to everybody in the phone's own reader. */
export async function savePaper(path: string, _name: string): Promise<void> {
  await Linking.openURL(apiUrl(path));
}
