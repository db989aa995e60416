import { expect, test } from 'vitest';
import { bookingsCsv, type BookingRow } from './bookings-csv';

const row: BookingRow = {
  id: '0f1c2b62-7d4e-4a0b-9a38-0c2f5b7f6a01',
  code: '7KDMXP',
  lake: 'Far Ostle',
  peg: 'FO7',
  type: '24 hours',
  from: new Date('2027-07-17T11:00:00Z'),
  until: new Date('2027-07-18T11:00:00Z'),
  rods: 2,
  people: 1,
  state: 'confirmed',
  grossPence: 2800,
  vatPence: 467,
  currency: 'GBP',
  method: 'card_online',
  receiptNumber: '2027-000418',
  refundedPence: 0,
  source: 'web',
};

test('a booking is a line of its columns', () => {
  expect(bookingsCsv([row]).split('\r\n')).toEqual([
    'id,code,lake,peg,type,start_utc,end_utc,rods,people,status,gross,vat,net,currency,method,receipt_no,refunded,source',
    '0f1c2b62-7d4e-4a0b-9a38-0c2f5b7f6a01,7KDMXP,Far Ostle,FO7,24 hours,2027-07-17T11:00:00Z,2027-07-18T11:00:00Z,2,1,confirmed,28.00,4.67,23.33,GBP,card_online,2027-000418,0.00,web',
    '',
  ]);
});

test('no name is taken for a formula, and nothing known is an empty cell', () => {
  const text = bookingsCsv([
    { ...row, lake: '=1+1', type: '@day, "late"', peg: null, method: null, receiptNumber: null },
  ]);
  expect(text).toContain(`,'=1+1,,"'@day, ""late""",2027`);
  expect(text).toContain('GBP,,,0.00,web');
});
