import type { Deps } from '#server/deps.ts';

export function settleRefund(_deps: Deps, _paymentId: string): Promise<void> {
  return Promise.resolve();
}

export function sweepHolds(_deps: Deps): Promise<void> {
  return Promise.resolve();
}
