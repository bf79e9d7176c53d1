/** As much of the payment company's script as the pay page uses. */
type StripeJs = {
  confirmCardPayment: (
    clientSecret: string,
    data: { payment_method: string },
  ) => Promise<{ error?: { message?: string }; paymentIntent?: { status: string } }>;
};

type WithStripe = Window & { Stripe?: (publishableKey: string) => StripeJs };

let loading: Promise<void> | undefined;

/** Fetches the script once, on the only page that needs it; a page that has it already takes that. */
function loadScript(url: string): Promise<void> {
  if ((window as WithStripe).Stripe) return Promise.resolve();
  loading ??= new Promise<void>((resolve, reject) => {
    const script = document.createElement('script');
    script.src = url;
    script.onload = () => resolve();
    script.onerror = () => {
      loading = undefined;
      script.remove();
      reject(new Error('The payment company cannot be reached at the moment. Nothing was charged; please try again.'));
    };
    document.head.append(script);
  });
  return loading;
}

/** Has the card's owner confirm a payment, bank's question included. Throws the company's sentence where it is refused. */
export async function confirmWithCard(
  company: { scriptUrl: string; publishableKey: string },
  payment: { clientSecret: string; methodId: string },
): Promise<void> {
  await loadScript(company.scriptUrl);
  const { Stripe } = window as WithStripe;
  if (!Stripe) throw new Error('The payment company cannot be reached at the moment. Nothing was charged.');
  const stripe = Stripe(company.publishableKey);
  const { error, paymentIntent } = await stripe.confirmCardPayment(payment.clientSecret, {
    payment_method: payment.methodId,
  });
  if (error || paymentIntent?.status !== 'succeeded') {
    throw new Error(
      `${error?.message ?? 'The card was not charged.'} Nothing was charged; try again or use another card.`,
    );
  }
}
