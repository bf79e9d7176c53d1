import type { Checkout } from '#shared/contracts/orders.ts';
import { lazyResolver } from './lazy-resolver.ts';

type Fields = Pick<Checkout, 'slotId' | 'name' | 'email' | 'phone' | 'note'>;

/** The contract's own rules for what a person types at the checkout. */
export const checkoutResolver = lazyResolver<Fields, Fields>(async () => {
  const { Checkout } = await import('#shared/contracts/orders-schema.ts');
  return Checkout.pick({ slotId: true, name: true, email: true, phone: true, note: true });
});
