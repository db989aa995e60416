import { Share } from 'react-native';

/** Hands a text file to whatever the phone offers for it. */
export async function saveText(name: string, text: string, _type: string): Promise<void> {
  await Share.share({ title: name, message: text });
}
