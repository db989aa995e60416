import { Linking } from 'react-native';
import { apiUrl } from '@/lib/api';

/** Opens the receipt's page in the phone's own reader. */
export async function printReceipt(receiptId: string, _number: string): Promise<void> {
  await Linking.openURL(apiUrl(`/receipts/${receiptId}/paper`));
}
