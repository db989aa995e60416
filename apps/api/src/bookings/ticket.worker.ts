import { drawTicket, type TicketSheet } from './ticket-pdf';

/** What the thread does with what it is given; the only thing that gives it anything is ticket-files. */
export default async function drawGiven(sheet: TicketSheet): Promise<Uint8Array> {
  return drawTicket(sheet);
}
