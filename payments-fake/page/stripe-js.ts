/**
 * The script that a browser loads in place of the payment company's own. It defines `window.Stripe` with the one call
 * that a page needs to confirm a payment with a saved card, and plays the bank's question in a dialog of its own.
 */
export function stripeScript(url: string): string {
  return `(() => {
  const ask = async (path, body) => {
    const answer = await fetch(${JSON.stringify(url)} + path, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
    return answer.json();
  };
  const askBank = () =>
    new Promise((resolve) => {
      const dialog = document.createElement('dialog');
      dialog.setAttribute('aria-label', 'Your bank asks');
      const words = document.createElement('p');
      words.textContent = 'Your bank asks whether it is you who pays. This is a stand-in: no money moves.';
      dialog.append(words);
      for (const [text, value] of [['Complete', 'complete'], ['Fail', 'fail']]) {
        const button = document.createElement('button');
        button.textContent = text;
        button.type = 'button';
        button.addEventListener('click', () => { dialog.remove(); resolve(value); });
        dialog.append(button);
      }
      document.body.append(dialog);
      dialog.showModal();
    });
  const Stripe = () => ({
    async confirmCardPayment(clientSecret, { payment_method } = {}) {
      let result = await ask('/stripe-js/confirm', { clientSecret, paymentMethod: payment_method });
      if (result.paymentIntent && result.paymentIntent.status === 'requires_action') {
        result = await ask('/stripe-js/authenticate', { clientSecret, answer: await askBank() });
      }
      return result;
    },
  });
  Stripe.version = 'endive';
  window.Stripe = Stripe;
})();
`;
}
