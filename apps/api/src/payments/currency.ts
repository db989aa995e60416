import { Currency } from '@mereward/shared/money/money';

/** A row's currency as one this program counts in; pounds where none is told. */
export const currencyOf = (code: string | undefined): Currency => Currency.catch('GBP').parse(code);
