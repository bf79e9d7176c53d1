import { EmptyState } from '#components/ui/empty-state.tsx';

export function NoDayOpen() {
  return (
    <EmptyState
      level={1}
      title="No day is open just now"
      words="Your basket is kept. As soon as a cutting day can be ordered for again, you can go on here."
    />
  );
}
