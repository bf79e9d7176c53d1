import type { Checkout } from '#shared/contracts/orders.ts';
import { lazyResolver } from './lazy-resolver.ts';

type Fields = Pick<Checkout, 'slotId' | 'name' | 'email' | 'phone' | 'note' | 'wantsNews'>;

/** The contract's own rules for what a person types at the checkout. */
export const checkoutResolver = lazyResolver<Fields, Fields>(async () => {
  const { orders } = await import('./form-schemas.ts');
  return orders.Checkout.pick({ slotId: true, name: true, email: true, phone: true, note: true, wantsNews: true });
});

/** Fetches the rules while the person still reads, so that the first field left does not wait for them. */
export function warmCheckoutRules(): void {
  void import('./form-schemas.ts').catch(() => undefined);
}
