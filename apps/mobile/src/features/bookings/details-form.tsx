import { useRef, useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import type { LettingTermsView } from '@mereward/shared/bookings/letting-terms';
import { useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { confirmBooking, fillInBooking, paymentPage } from '@/features/bookings/booking-api';
import { detailsDraft } from '@/features/bookings/details-draft';
import {
  asksBirth,
  detailsSchema,
  detailsStart,
  fillInOf,
  licenceOf,
  needsContact,
  needsGuardian,
  needsVehicle,
  type Asked,
  type DetailsForm,
} from '@/features/bookings/details-fields';
import { GuardianPart } from '@/features/bookings/guardian-part';
import { LicencePart } from '@/features/bookings/licence-part';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { goTo } from '@/lib/go-to';
import { money } from '@/lib/format';

type Props = { asked: Asked; terms: Pick<LettingTermsView, 'cardPayments' | 'details'> };

/** What a booking still asks for, and the one act that ends it: paying, or taking the ticket where nothing is to be paid. */
export function BookingDetailsForm({ asked, terms }: Props) {
  const { booking } = asked;
  const [schema] = useState(() => detailsSchema(asked));
  const atLodge = useRef(false);
  const form = useDraftForm({
    form: detailsDraft(booking.id),
    schema,
    start: detailsStart(booking),
    send: (typed) => finish(asked, { typed, atLodge: atLodge.current }),
  });
  const owed = booking.grossPence - booking.paidPence;
  const lodge = owed > 0 && terms.details.payAtLodge;
  const card = owed > 0 && terms.cardPayments;
  const go = (pays: 'card' | 'lodge') => (): void => {
    atLodge.current = pays === 'lodge';
    form.submit();
  };
  if (owed > 0 && !card && !lodge)
    return (
      <Note kind="caution" title="This fishery takes no card here yet">
        Ring the office: a ticket written there for your e-mail address is shown under My tickets.
      </Note>
    );
  const act = card ? `Pay ${money(owed, booking.currency)}` : 'Take the ticket';
  return (
    <DraftFormFrame
      form={{ ...form, submit: go(card || owed <= 0 ? 'card' : 'lodge') }}
      label="Your booking"
      act={act}
      busyLabel="Keeping…"
      bank
      beside={
        card && lodge ? (
          <Button label="Pay at the lodge on the day" bank disabled={form.busy} onPress={go('lodge')} />
        ) : null
      }
    >
      <Fields asked={asked} form={form} />
      {lodge && !card ? (
        <Text>{`${money(owed, booking.currency)} is paid at the lodge on the day.`}</Text>
      ) : null}
    </DraftFormFrame>
  );
}

type Sent = { typed: DetailsForm; atLodge: boolean };

/** Keeps what was filled in, then goes to the payment page; where nothing is to be paid now the ticket is there at once. */
async function finish(asked: Asked, { typed, atLodge }: Sent): Promise<BookingView> {
  const { booking } = asked;
  const kept = booking.may.fillIn ? await fillInBooking(booking.id, fillInOf(asked, typed)) : booking;
  if (kept.may.confirm && (atLodge || !kept.may.pay)) return confirmBooking(kept.id);
  if (kept.may.pay) goTo((await paymentPage(kept.id)).url);
  return kept;
}

type FieldsProps = { asked: Asked; form: DraftForm<DetailsForm, DetailsForm> };

function Fields({ asked, form }: FieldsProps) {
  const { control } = form;
  useWatch({ control }); // draws anew as things are typed: what is asked for follows from it
  const typed = form.getValues();
  const licence = licenceOf(asked, typed);
  const { tickets } = asked.booking.details;
  return (
    <>
      {tickets.map((ticket, i) => (
        <View key={String(i)} style={{ gap: space.medium }}>
          <FormField
            control={control}
            name={`tickets.${i}.name`}
            label={nameLabel(asked.booking, i)}
            autoComplete={ticket.kind === 'holder' ? 'name' : 'off'}
          />
          {asksBirth(asked, i) ? (
            <FormField
              control={control}
              name={`tickets.${i}.bornOn`}
              label="Date of birth"
              hint="The age on the day fished decides about this ticket."
              picker="date"
            />
          ) : null}
        </View>
      ))}
      {needsGuardian(asked, typed) ? <GuardianPart control={control} /> : null}
      {needsContact(asked, typed) ? (
        <FormField
          control={control}
          name="emergencyContact"
          label="Whom to ring in an emergency"
          hint="A name and a telephone number. Read by the bailiff only when it is needed."
        />
      ) : null}
      <FormField
        control={control}
        name="vehicle"
        label="Vehicle registration"
        optional={!needsVehicle(asked)}
        hint={needsVehicle(asked) ? 'Or “none” if you come without.' : undefined}
      />
      {licence === null ? null : <LicencePart control={control} licence={licence} />}
      <FormField control={control} name="note" label="A word to the bailiff" optional lines={2} />
      <Text>Byelaws and notices on the bank beat this page.</Text>
    </>
  );
}

/** "Your name", or whose it is and on which peg where there are several. */
function nameLabel({ details: { tickets }, pegs }: BookingView, index: number): string {
  const ticket = tickets[index];
  const peg = pegs.find(({ pegId }) => pegId === ticket?.pegId);
  const who =
    ticket?.kind === 'junior' ? 'Junior’s name' : ticket?.kind === 'guest' ? 'Guest’s name' : 'Angler’s name';
  return tickets.length > 1 && peg ? `${who}, peg ${peg.number}` : who;
}
