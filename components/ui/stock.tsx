import { Badge } from './badge.tsx';

/** How many can be bought now, in words and by the fill of the rail: few or held is straw, none is quiet. */
export function Stock({ free, held = 0, open = true }: { free: number; held?: number; open?: boolean }) {
  if (!open) return <Badge kind="quiet">Orders are closed</Badge>;
  if (free > 0) return <Badge kind={held > 0 && free <= FEW ? 'held' : 'free'}>{leftWords(free, held)}</Badge>;
  return held > 0 ? <Badge kind="held">{`None left, ${held} held`}</Badge> : <Badge kind="quiet">Sold out</Badge>;
}

const FEW = 5;

/** What others hold at the till may come back: worth saying once few are left. */
function leftWords(free: number, held: number): string {
  return held > 0 && free <= FEW ? `${free} left, ${held} held` : `${free} left`;
}
