import type { CheckoutForm } from '#shared/contracts/checkout-form-schema.ts';
import { lazyResolver } from './lazy-resolver.ts';

/** The contract's own rules for what a person types at the checkout. */
export const checkoutResolver = lazyResolver<CheckoutForm, CheckoutForm>(async () => {
  const { checkout } = await import('./form-schemas.ts');
  return checkout.CheckoutForm;
});

/** Fetches the rules while the person still reads, so that the first field left does not wait for them. */
export function warmCheckoutRules(): void {
  void import('./form-schemas.ts').catch(() => undefined);
}
