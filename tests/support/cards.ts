import { openCardProvider, type CardProvider } from '@mereward/api/demo/card-provider/server';
import type { Card } from '@mereward/api/demo/card-provider/deeds';
import { reconcile } from '@mereward/api/bookings/payment-jobs';
import { makeLogger } from '@mereward/api/http/logging';
import { BookingView } from '@mereward/shared/bookings/contract';
import { PaymentPage } from '@mereward/shared/bookings/contract';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { until } from './killed-server';
import type { Person } from './people';
import { aServer, type TestServer } from './server';
import { aHold, filledIn } from './tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from './waters';
import { aTicketType } from './tickets';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';

export const CARD_KEY = 'sk_test_of_the_tests';
export const CARD_SECRET = 'whsec_of_the_tests';

/** A server that takes cards, listening, so that the provider's own messages reach it. */
export type CardGround = {
  server: TestServer;
  provider: CardProvider;
  here: TestFishery;
  lake: TestLake;
  stay: { id: string };
  freshPeg: (number?: string) => Promise<TestPeg>;
  /** A hold of one peg for 24 hours from noon, filled in, by somebody. */
  aFilledHold: (who: Person, peg: TestPeg, day?: string) => Promise<BookingView>;
  /** Opens the page and tries a card on it; answers the page's address. */
  pageOf: (who: Person, bookingId: string) => Promise<string>;
  /** All messages of the provider have been heard. */
  quiet: () => Promise<void>;
  reconcile: () => Promise<void>;
  close: () => Promise<void>;
};

export const SATURDAY = '2027-07-17';

export async function aCardGround(): Promise<CardGround> {
  const provider = await openCardProvider({
    key: CARD_KEY,
    webhookSecret: CARD_SECRET,
    webhookUrl: null,
    file: null,
  });
  const env = {
    STRIPE_SECRET_KEY: CARD_KEY,
    STRIPE_WEBHOOK_SECRET: CARD_SECRET,
    STRIPE_URL: provider.url,
  };
  const server = await aServer({ env });
  const http = createServer(server.app);
  await new Promise<void>((listening) => http.listen(0, '127.0.0.1', listening));
  provider.sendTo(`${addressOf(http)}/api/payments/webhook`);
  server.setNow('2027-07-10T18:00:00Z');
  const here = await aFishery(server, {
    name: 'Ostlemere Waters',
    legalEntity: 'Ostlemere Waters Ltd',
    vatStatus: 'registered',
    vatNumber: 'GB000000000',
  });
  const lake = await aLake(server, here, { name: 'Far Ostle' });
  const stay = await aTicketType(server, lake, TICKET_TEMPLATES.stay24);
  const logger = makeLogger(server.server.config);
  let pegs = 0;
  return {
    server,
    provider,
    here,
    lake,
    stay,
    freshPeg: (number) => aPeg(server, lake, { number: number ?? `W${(pegs += 1)}` }),
    async aFilledHold(who, peg, day = SATURDAY) {
      const body = aHold({ ticketTypeId: stay.id, lakeId: lake.id, day, start: '12:00' }, [peg.id]);
      const held = BookingView.parse((await who.post('/bookings').send(body)).body);
      const answer = await who.put(`/bookings/${held.id}/details`).send(filledIn(held.version));
      return BookingView.parse(answer.body);
    },
    async pageOf(who, bookingId) {
      const answer = await who.post(`/bookings/${bookingId}/page`);
      return PaymentPage.parse(answer.body).url;
    },
    quiet: () => until(async () => provider.kept.waiting.length === 0),
    reconcile: () => reconcile(server.server, logger),
    async close() {
      await provider.close();
      http.closeAllConnections();
      await new Promise((closed) => http.close(closed));
      await server.close();
    },
  };
}

function addressOf(http: Server): string {
  const { port } = http.address() as AddressInfo;
  return `http://127.0.0.1:${port}`;
}

const form = (fields: Record<string, string>) => ({
  method: 'POST',
  headers: { 'content-type': 'application/x-www-form-urlencoded' },
  body: new URLSearchParams(fields).toString(),
  redirect: 'manual' as const,
});

/** Tries a card on the provider's page; answers where the page sends its reader. */
export async function tryCard(page: string, card: Card): Promise<string> {
  const answer = await fetch(page, form({ card }));
  return answer.headers.get('location') ?? '';
}

/** Answers the bank's question. */
export async function answerBank(page: string, yes: boolean): Promise<string> {
  const answer = await fetch(`${page}/bank`, form({ answer: yes ? 'yes' : 'no' }));
  return answer.headers.get('location') ?? '';
}
