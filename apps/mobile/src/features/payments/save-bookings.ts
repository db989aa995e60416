import type { Period } from '@/features/payments/api';
import { api } from '@/lib/api';
import { saveText } from '@/lib/save-file';

/** Fetches the bookings that begin in a period as a file for a spreadsheet, and hands it over. */
export async function saveBookings(fisheryId: string, { from, until }: Period): Promise<void> {
  const file = await api.file(`/fisheries/${fisheryId}/bookings.csv?from=${from}&until=${until}`);
  await saveText(`bookings-${from}-${until}.csv`, await file.text(), 'text/csv;charset=utf-8');
}
