/** Why a card was refused, and what to do. Nothing was taken in any of these. Codes as Stripe's documentation lists them. */
export function declinedWords(code: string): string {
  switch (code) {
    case 'insufficient_funds':
      return 'There is not enough money on that card. Nothing was taken. Try another card.';
    case 'expired_card':
      return 'That card has run out. Nothing was taken. Try another card.';
    case 'authentication_required':
    case 'payment_intent_authentication_failure':
      return 'Your bank’s question was not answered with yes. Nothing was taken. Try again, or another card.';
    case 'processing_error':
      return 'The card’s bank could not be reached. Nothing was taken. Try again in a minute.';
    default:
      return 'The card was declined. Nothing was taken. Try another card, or ask your bank why.';
  }
}
