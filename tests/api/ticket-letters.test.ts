import { bookForSomebody } from '@mereward/api/bookings/book-for-somebody';
import { confirmBooking } from '@mereward/api/bookings/confirm';
import type { Actor, Ctx } from '@mereward/api/ctx';
import { ctxOf } from '@mereward/api/http/ctx-of';
import type { CapturedMail } from '@mereward/api/mail/capture';
import { BookingView, type BookForSomebody } from '@mereward/shared/bookings/contract';
import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { pagesOf, readsPdf } from '../support/pdf-words';
import { aPerson, aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, bookedFor } from '../support/tickets';
import { aPeg, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;
let stay: { id: string };
let ned: Person;

const EVENING = '2027-10-20T17:00:00Z'; // 18:00 by the lake's clock
/** In the night to Sunday the lake's clock goes back an hour. */
const SATURDAY = '2027-10-30';
const NAME = 'Ned <b onclick="x()">Bray</b>';

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
  server.setNow(EVENING);
  stay = await aTicketType(server, lake, TICKET_TEMPLATES.stay24);
});
beforeEach(async () => {
  server.setNow(EVENING);
  ned = await aPerson(server, { name: NAME });
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = () => aPeg(server, lake, { number: `FO${(pegs += 1)}` });
const wishFor = async (day = SATURDAY) =>
  aHold({ ticketTypeId: stay.id, lakeId: lake.id, day, start: '12:00' }, [(await freshPeg()).id]);
/** A ticket the office wrote for Ned. */
const booked = async (day = SATURDAY): Promise<BookingView> =>
  bookedFor(here, await wishFor(day), { name: NAME, email: ned.email });
const mailsTo = (who: Person): CapturedMail[] => server.mails.filter(({ to }) => to === who.email);
const subjectsTo = (who: Person): string[] => mailsTo(who).map(({ subject }) => subject);
const fileOf = (mail: CapturedMail, ending: string): Buffer => {
  const file = mail.enclosed.find(({ filename }) => filename.endsWith(ending));
  if (!file) throw new Error(`No ${ending} came with “${mail.subject}”`);
  return file.content;
};
const linesOf = (ics: Buffer): string[] => ics.toString().replace(/\r\n /g, '').split('\r\n');
const byServer = <T>(deed: (ctx: Ctx) => Promise<T>, actor?: Actor): Promise<T> =>
  server.server.source.transaction((tx) => deed(ctxOf(server.server, tx, actor)));

describe('the letter of a confirmed ticket', () => {
  test('says what was bought, with the zone of each time over the night the clock goes back', async () => {
    const ticket = await booked();
    const mail = await server.mailTo(ned.email);
    const code = bookingCodeWords(ticket.code);
    expect(mail.subject).toContain(`ticket ${code} is confirmed`);
    for (const words of [
      `Your code: ${code}`,
      'From: Sat 30 October 2027, 12:00 BST',
      'Until: Sun 31 October 2027, 12:00 GMT',
      '£28.00, VAT at 20 % in it £4.67',
      'Still to be paid: £28.00',
      'Until Sat 23 October 2027, 12:00: all of it back',
      `/water/rules/${here.id}`,
      'Ring 999 or 112',
      'Rod licence: Anyone of 13 or over',
      'Do not leave rods unattended: in England and Wales it is an offence.',
      `/tickets/bookings/${ticket.id}`,
    ]) {
      expect(mail.text).toContain(words);
      const shown = words.replace(/^(Your code|From|Until): /, '');
      expect(mail.html.replace(/&amp;/g, '&')).toContain(shown);
    }
    expect(mail.text).toContain(NAME);
    expect(mail.html).toContain('Ned &lt;b onclick=&quot;x()&quot;&gt;Bray&lt;/b&gt;');
    expect(mail.html).not.toContain('<b onclick');
    expect(Buffer.byteLength(mail.html)).toBeLessThanOrEqual(60_000);
  });

  test('brings the ticket for a calendar, as RFC 5545 has it, and on paper', async () => {
    const ticket = await booked();
    const mail = await server.mailTo(ned.email);
    expect(mail.enclosed.map(({ contentType }) => contentType)).toEqual(['application/pdf', 'text/calendar']);
    const lines = linesOf(fileOf(mail, '.ics'));
    for (const line of [
      'METHOD:PUBLISH',
      `UID:booking-${ticket.id}@127.0.0.1`,
      'DTSTART;TZID=Europe/London:20271030T120000',
      'DTEND;TZID=Europe/London:20271031T120000',
      'STATUS:CONFIRMED',
    ])
      expect(lines).toContain(line);
    const pdf = fileOf(mail, '.pdf');
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
    const again = await ned.get(`/bookings/${ticket.id}/ticket.pdf`).buffer();
    expect(pdf.equals(again.body)).toBe(true);
    if (!readsPdf) return;
    const words = pagesOf(pdf);
    expect(words).toHaveLength(1);
    for (const said of [bookingCodeWords(ticket.code), 'Sun 31 October 2027, 12:00 GMT', '£28.00', '999'])
      expect(words[0]).toContain(said);
  });

  test('holds no file while it waits, and is one however often the ticket is sent', async () => {
    const body: BookForSomebody = {
      ...(await wishFor()),
      holder: { name: 'Ned Bray', email: ned.email },
      vehicle: '',
      note: '',
    };
    const send = () => here.people.office.post(`/fisheries/${here.id}/bookings`).send(body);
    const answers = await Promise.all([send(), send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    const [waiting]: { data: { enclosure: unknown }; size: number }[] = await server.server.source.query(
      `SELECT data, length(data::text) AS size FROM pgboss.job WHERE name = 'mail.send' AND data->>'to' = $1`,
      [ned.email],
    );
    expect(waiting?.data.enclosure).toEqual({ kind: 'ticket', id: body.id });
    expect(waiting?.size).toBeLessThan(60_000);
    await server.settle();
    expect(mailsTo(ned)).toHaveLength(1);
  });

  test('is not there when its deed fails', async () => {
    const body = { ...(await wishFor()), holder: { name: 'Ned', email: ned.email }, vehicle: '', note: '' };
    const { id } = here.people.office;
    const actor: Actor = { kind: 'account', id, roles: new Map([[here.id, new Set(['office'] as const)]]) };
    const failing = byServer(async (ctx) => {
      await bookForSomebody(ctx, here.id, body);
      throw new RangeError('the deed fails after its letter was queued');
    }, actor);
    await expect(failing).rejects.toThrow(RangeError);
    await server.settle();
    expect(mailsTo(ned)).toHaveLength(0);
    await byServer((ctx) => bookForSomebody(ctx, here.id, body), actor);
    await server.settle();
    expect(mailsTo(ned)).toHaveLength(1);
  });

  test('is sent once, whole, when the process that had it in hand was killed', async () => {
    await booked();
    await server.server.source.query(
      `UPDATE pgboss.job SET state = 'active', started_on = now() WHERE name = 'mail.send' AND data->>'to' = $1`,
      [ned.email],
    );
    await server.startWorker();
    await vi.waitFor(() => expect(mailsTo(ned)).toHaveLength(1), { timeout: 20_000, interval: 50 });
    await server.stopWorkers();
    await server.settle();
    expect(mailsTo(ned)).toHaveLength(1);
    expect(mailsTo(ned)[0]?.enclosed).toHaveLength(2);
  });
});

describe('the letters before', () => {
  const held = async (): Promise<BookingView> =>
    BookingView.parse((await ned.post('/bookings').send(await wishFor())).body);

  test('a hold runs out come once, three minutes before its end, and only while it is unpaid', async () => {
    const [open, confirmed, given] = [await held(), await held(), await held()];
    await byServer((ctx) => confirmBooking(ctx, confirmed.id));
    await ned.delete(`/bookings/${given.id}/hold`);
    server.pass(7 * 60 + 1);
    await server.settle();
    expect(subjectsTo(ned).filter((subject) => subject.includes('kept for you until 18:10'))).toHaveLength(1);
    const [mail] = mailsTo(ned);
    expect(mail?.text).toContain(`/tickets/bookings/${open.id}`);
    expect(mail?.text).toContain('You have no ticket yet');
  });

  test('a ticket begins bring notices, once, and follow it to another day', async () => {
    const [ticket, moved] = [await booked(), await booked()];
    const notice = {
      id: randomUUID(),
      lakeIds: [],
      severity: 'danger',
      from: '2027-10-28T08:00:00Z',
      until: null,
      details: { title: 'Blue-green algae', text: 'Assume toxic. No contact, no dogs.', audience: 'ticket' },
    };
    const written = await here.people.head_bailiff.post(`/fisheries/${here.id}/notices`).send(notice);
    expect(written.status).toBeLessThan(300);
    const { version, pegs: places } = moved;
    const to = { version, day: '2027-10-31', start: '12:00', lakeId: lake.id, reason: '' };
    const move = await here.people.office
      .post(`/bookings/${moved.id}/move`)
      .send({ ...to, pegIds: places.map(({ pegId }) => pegId) });
    expect(move.status).toBe(200);
    server.setNow('2027-10-29T17:00:05Z');
    await server.settle();
    const eve = mailsTo(ned).filter(({ subject }) => subject.includes('tomorrow from 12:00'));
    expect(eve).toHaveLength(1);
    expect(eve[0]?.text).toContain(`/tickets/bookings/${ticket.id}`);
    expect(eve[0]?.text).toContain('Blue-green algae: Assume toxic.');
    expect(eve[0]?.enclosed).toHaveLength(2);
  });
});

describe('a letter about what others did', () => {
  test('waits in the quiet hours until seven by the lake’s clock', async () => {
    const ticket = await booked('2027-11-06');
    await server.settle();
    server.setNow('2027-10-20T22:30:00Z'); // 23:30 there
    const { version, pegs: places } = ticket;
    const to = { version, day: '2027-11-07', start: '12:00', lakeId: lake.id, reason: 'A match.' };
    const body = { ...to, pegIds: places.map(({ pegId }) => pegId) };
    expect((await here.people.office.post(`/bookings/${ticket.id}/move`).send(body)).status).toBe(200);
    expect((await here.people.office.post(`/bookings/${ticket.id}/move`).send(body)).status).toBe(200);
    const waits: { hours: number }[] = await server.server.source.query(
      `SELECT extract(epoch FROM start_after - created_on)::float / 3600 AS hours FROM pgboss.job
        WHERE name = 'mail.send' AND data->>'to' = $1`,
      [ned.email],
    );
    expect(waits).toEqual([{ hours: 7.5 }]);
    const mail = await server.mailTo(ned.email);
    expect(mail.subject).toContain('has moved');
    expect(mail.text).toContain('Why: A match.');
    expect(mail.text).toMatch(/It was: .*, Sat 6 November 2027, 12:00 GMT\./);
    expect(mail.text).toContain('From: Sun 7 November 2027, 12:00 GMT');
    expect(linesOf(fileOf(mail, '.ics'))).toContain('SEQUENCE:2');
  });

  test('takes a cancelled ticket out of the calendar, and brings no paper', async () => {
    const ticket = await booked();
    const answers = await Promise.all(
      [0, 1].map(() => here.people.office.delete(`/bookings/${ticket.id}`).send({})),
    );
    expect(answers.map(({ status }) => status)).toEqual([204, 204]);
    await server.settle();
    const cancelled = mailsTo(ned).filter(({ subject }) => subject.includes('is cancelled'));
    expect(cancelled).toHaveLength(1);
    expect(cancelled[0]?.text).toContain('Nothing had been paid for it.');
    expect(cancelled[0]?.enclosed.map(({ filename }) => filename)).toEqual([`ticket-${ticket.code}.ics`]);
    const lines = linesOf(fileOf(cancelled[0] as CapturedMail, '.ics'));
    expect(lines).toContain('METHOD:CANCEL');
    expect(lines).toContain('STATUS:CANCELLED');
  });
});

describe('a ticket’s papers', () => {
  test('are for its holder and the staff who see it, and for nobody else', async () => {
    const { id } = await booked();
    const colin = await aPerson(server);
    for (const paper of ['ticket.pdf', 'ticket.ics']) {
      expect((await ned.get(`/bookings/${id}/${paper}`)).status).toBe(200);
      const office = await here.people.office.get(`/bookings/${id}/${paper}`);
      expect(office.status).toBe(200);
      expect(office.get('cache-control')).toBe('private, no-store');
      expect((await colin.get(`/bookings/${id}/${paper}`)).status).toBe(404);
      expect((await elsewhere.people.owner.get(`/bookings/${id}/${paper}`)).status).toBe(404);
      expect((await aStranger(server).get(`/bookings/${id}/${paper}`)).status).toBe(401);
      expect((await ned.get(`/bookings/not-an-id/${paper}`)).status).toBe(404);
    }
  });

  test('are not there for what is only held', async () => {
    const hold = BookingView.parse((await ned.post('/bookings').send(await wishFor())).body);
    expect((await ned.get(`/bookings/${hold.id}/ticket.pdf`)).status).toBe(409);
    expect((await ned.get(`/bookings/${hold.id}/ticket.ics`)).status).toBe(409);
  });
});
