import { Badge } from './badge.tsx';

type MailStateProps = { state: 'queued' | 'sent' | 'failed' | 'bounced' };

const kinds = { queued: 'held', sent: 'free', failed: 'sold', bounced: 'sold' } as const;

/** What became of a mail. */
export function MailState({ state }: MailStateProps) {
  return <Badge kind={kinds[state]}>{state}</Badge>;
}
