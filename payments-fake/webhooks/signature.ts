import { createHmac } from 'node:crypto';

/** The Stripe-Signature header: HMAC SHA-256 of the stamp, a full stop and the body. The stamp is the real time. */
export function signWebhook(body: string, secret: string): string {
  const stamp = Math.floor(Date.now() / 1000);
  const digest = createHmac('sha256', secret).update(`${stamp}.${body}`).digest('hex');
  return `t=${stamp},v1=${digest}`;
}
