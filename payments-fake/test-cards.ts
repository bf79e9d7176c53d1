export type Decline = { code: string; declineCode: string; message: string };

export type TestCard = {
  number: string;
  /** The name under which the API knows the card, in place of a number. */
  token: string;
  brand: 'visa' | 'mastercard';
  effect: string;
  decline?: Decline;
  /** When the bank asks the cardholder to prove who they are. */
  authentication?: 'until-set-up' | 'always';
  /** What becomes of a refund to this card. Without it the refund succeeds at once. */
  refund?: 'pending' | 'failing';
};

export const genericDecline: Decline = {
  code: 'card_declined',
  declineCode: 'generic_decline',
  message: 'Your card was declined.',
};

export const authenticationRequired: Decline = {
  code: 'authentication_required',
  declineCode: 'authentication_required',
  message: 'Your card was declined. This transaction requires authentication.',
};

/** Numbers, names and effects as Stripe publishes them at https://docs.stripe.com/testing. */
export const testCards: TestCard[] = [
  { number: '4242424242424242', token: 'pm_card_visa', brand: 'visa', effect: 'Payment succeeds' },
  { number: '5555555555554444', token: 'pm_card_mastercard', brand: 'mastercard', effect: 'Payment succeeds' },
  {
    number: '4000000000000002',
    token: 'pm_card_chargeDeclined',
    brand: 'visa',
    effect: 'Declined',
    decline: genericDecline,
  },
  {
    number: '4000000000009995',
    token: 'pm_card_chargeDeclinedInsufficientFunds',
    brand: 'visa',
    effect: 'Declined: insufficient funds',
    decline: { code: 'card_declined', declineCode: 'insufficient_funds', message: 'Your card has insufficient funds.' },
  },
  {
    number: '4000000000000069',
    token: 'pm_card_chargeDeclinedExpiredCard',
    brand: 'visa',
    effect: 'Declined: expired card',
    decline: { code: 'expired_card', declineCode: 'expired_card', message: 'Your card has expired.' },
  },
  {
    number: '4000000000000127',
    token: 'pm_card_chargeDeclinedIncorrectCvc',
    brand: 'visa',
    effect: 'Declined: wrong security code',
    decline: {
      code: 'incorrect_cvc',
      declineCode: 'incorrect_cvc',
      message: "Your card's security code is incorrect.",
    },
  },
  {
    number: '4000002500003155',
    token: 'pm_card_authenticationRequiredOnSetup',
    brand: 'visa',
    effect: 'Asks for authentication, until saved for later use',
    authentication: 'until-set-up',
  },
  {
    number: '4000002760003184',
    token: 'pm_card_authenticationRequired',
    brand: 'visa',
    effect: 'Always asks for authentication',
    authentication: 'always',
  },
  {
    number: '4000000000005126',
    token: 'pm_card_pendingRefund',
    brand: 'visa',
    effect: 'Payment succeeds; a refund is pending for a while',
    refund: 'pending',
  },
  {
    number: '4000000000007726',
    token: 'pm_card_refundFail',
    brand: 'visa',
    effect: 'Payment succeeds; a refund fails a while later',
    refund: 'failing',
  },
];

/** Any other number, real ones included: declined, and never kept. */
export const otherCard: TestCard = {
  number: '',
  token: 'pm_other',
  brand: 'visa',
  effect: 'Declined: not a test card',
  decline: {
    code: 'card_declined',
    declineCode: 'test_mode_live_card',
    message: 'Your card was declined: only the published test cards work here.',
  },
};

export function findCardByNumber(number: string): TestCard {
  return testCards.find((card) => card.number === number) ?? otherCard;
}

export function findCardByToken(token: string): TestCard | undefined {
  return testCards.find((card) => card.token === token);
}

/** The check digit of a card number (ISO/IEC 7812-1, Luhn's formula). */
export function hasRightCheckDigit(number: string): boolean {
  if (!/^\d{12,19}$/.test(number)) return false;
  const sum = [...number].reverse().reduce((total, figure, place) => {
    const value = Number(figure) * (place % 2 === 1 ? 2 : 1);
    return total + (value > 9 ? value - 9 : value);
  }, 0);
  return sum % 10 === 0;
}
