import { api } from '@/lib/api';
import { saveBlob } from '@/lib/save-file.web';

/** Fetches the receipt's page as this reader, and saves it to be printed or sent on. */
export async function printReceipt(receiptId: string, number: string): Promise<void> {
  saveBlob(`receipt-${number}.html`, await api.file(`/receipts/${receiptId}/paper`));
}
