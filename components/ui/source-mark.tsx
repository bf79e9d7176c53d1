import { Badge } from './badge.tsx';

/** Whether a weight was foreseen or read off a scale. */
export function SourceMark({ source }: { source: 'estimated' | 'weighed' }) {
  return <Badge kind={source === 'weighed' ? 'free' : 'held'}>{source}</Badge>;
}
