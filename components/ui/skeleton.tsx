type SkeletonProps = {
  /** Takes the room of what will come: lines of text, rows of a list, a block, a rail. */
  shape?: 'lines' | 'rows' | 'block' | 'rail';
  count?: number;
};

/** Stands where the figures will, as large as they will be. What is awaited is said by `StateView`. */
export function Skeleton({ shape = 'lines', count = 3 }: SkeletonProps) {
  const pieces = shape === 'lines' || shape === 'rows' ? count : 1;
  return (
    <div className={`w-bones w-bones-${shape}`} aria-hidden="true">
      {Array.from({ length: pieces }, (_, at) => (
        <span key={at} className="w-bone" />
      ))}
    </div>
  );
}
