import type { BookingView } from '@mereward/shared/bookings/contract';
import type { Jurisdiction } from '@mereward/shared/fisheries/contract';
import { Checkbox } from '@/components/checkbox';
import { Note } from '@/components/note';
import { OutLink } from '@/components/out-link';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { cleanTackle } from '@/features/bookings/clean-tackle';

const CLEANED_LINK = 'https://www.nonnativespecies.org/what-can-i-do/check-clean-dry/';

type Props = { booking: BookingView; jurisdiction: Jurisdiction | undefined };

/** What holds on the bank, where it is read: beside the ticket. */
export function TicketCautions({ booking, jurisdiction }: Props) {
  const cleaned = cleanTackle.use(booking.id);
  return (
    <Section title="On the bank">
      <Text>
        A ticket is permission to fish, not a rod licence. Byelaws and notices on the bank beat this page.
      </Text>
      <Note kind="caution" title="Do not leave rods unattended">
        {jurisdiction === 'ENG' || jurisdiction === 'WAL'
          ? 'In England and Wales it is an offence under the national byelaws. Wind in before you walk away.'
          : 'Wind in before you walk away.'}
      </Note>
      <Text>Check, clean and dry nets, mats and boots before you come and when you leave.</Text>
      <Checkbox
        label="Nets, mats and boots are clean and dry"
        checked={cleaned}
        onChange={(on) => cleanTackle.set(booking.id, on)}
      />
      <OutLink href={CLEANED_LINK} label="Check, clean, dry: the campaign’s own page" />
    </Section>
  );
}
