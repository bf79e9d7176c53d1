/** The published test cards by what they do. */
export const cards = {
  good: '4242 4242 4242 4242',
  declined: '4000 0000 0000 0002',
  withoutFunds: '4000 0000 0000 9995',
  asksUntilSaved: '4000 0025 0000 3155',
  asksAlways: '4000 0027 6000 3184',
  refundPending: '4000 0000 0000 5126',
  refundFails: '4000 0000 0000 7726',
};

export type PaymentResult =
  | { outcome: 'paid'; returnedTo: string }
  | { outcome: 'refused'; status: number; message: string }
  | { outcome: 'asked'; url: string };

export type PayOptions = {
  /** What the bank's page answers to a card that asks. Without it the payer stays on that page. */
  bank?: 'complete' | 'fail';
  email?: string;
  name?: string;
  expiry?: string;
  cvc?: string;
};

async function post(url: string, fields: Record<string, string>): Promise<Response> {
  return fetch(url, { method: 'POST', body: new URLSearchParams(fields), redirect: 'manual' });
}

function messageIn(page: string): string {
  const box = /role="alert">([^<]*)</.exec(page) ?? /<h1>([^<]*)</.exec(page);
  const text = (box?.[1] ?? '').replace(/\s+/g, ' ').trim();
  return text.replaceAll('&#39;', "'").replaceAll('&quot;', '"').replaceAll('&amp;', '&');
}

/** Goes where the payment page sends the payer, and answers the bank on the way. */
async function follow(from: string, response: Response, bank: PayOptions['bank']): Promise<PaymentResult> {
  const location = response.headers.get('location');
  if (location === null)
    return { outcome: 'refused', status: response.status, message: messageIn(await response.text()) };
  const next = new URL(location, from);
  if (next.origin !== new URL(from).origin || !/^\/(pay|authenticate)\//.test(next.pathname)) {
    return { outcome: 'paid', returnedTo: next.href };
  }
  if (!next.pathname.startsWith('/authenticate/')) {
    return follow(next.href, await fetch(next, { redirect: 'manual' }), bank);
  }
  if (bank === undefined) return { outcome: 'asked', url: next.href };
  return answerBank(next.href, bank);
}

/** Presses Complete or Fail on the page that plays the payer's bank. */
export async function answerBank(url: string, answer: 'complete' | 'fail'): Promise<PaymentResult> {
  return follow(url, await post(url, { answer }), undefined);
}

/** Pays a session on its hosted page, as a browser without scripts would. `url` is the session's own. */
export async function payByCard(url: string, cardNumber: string, options: PayOptions = {}): Promise<PaymentResult> {
  const opened = await fetch(url, { redirect: 'manual' });
  const page = await opened.clone().text();
  const formId = /name="formId" value="([^"]+)"/.exec(page)?.[1];
  if (formId === undefined) return follow(url, opened, options.bank);
  const { email = 'payer@example.com', name = 'A Payer', expiry = '12 / 40', cvc = '123', bank } = options;
  return follow(url, await post(url, { formId, email, name, expiry, cvc, card: cardNumber }), bank);
}
