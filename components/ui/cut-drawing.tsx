export type CutDrawingKind = 'grill' | 'roast' | 'pot-roast' | 'braise' | 'mince';

type Shape = { flesh: string; fat?: string; lines: string };

// Drawn on a grid of 64 by 44: the flesh as one flat shape, the fat over it, then the pen.
const shapes: Record<CutDrawingKind, Shape> = {
  grill: {
    flesh: 'M8 27C5 17 13 8 25 8c11 0 15 5 22 6 7 1 11 6 9 13-2 8-10 11-20 10-6-.6-9-1-15 0-7 1-11-3-13-10z',
    fat: 'M8 27C5 17 13 8 25 8c11 0 15 5 22 6 7 1 11 6 9 13-1-5-5-8-11-9-7-1-11-6-20-6-10 0-16 6-17 15z',
    lines: 'M20 22c4-2 8-1 11 1M28 29c4 1 9 0 12-3M40 22c2 0 4 1 6 3M17 29c2 0 4-1 5-2',
  },
  roast: {
    flesh: 'M9 25C9 13 19 7 33 7s23 6 23 17-9 14-23 14S9 36 9 25z',
    fat: 'M11 18C14 11 22 7 33 7s20 4 22 11c-4-4-12-6-22-6s-18 2-22 6z',
    lines:
      'M20 9.5c-4 8-4 20 0 26.500M33 7c-4 9-4 22 0 31M46 9.500c-4 8-4 20 0 26.500M33 7c2-4 6-4 6-1s-4 2-6 1c-2-4-6-4-6-1s4 2 6 1',
  },
  'pot-roast': {
    flesh: 'M6 24c0-8 6-12 14-12h24c9 0 14 4 14 12s-5 12-14 12H20C12 36 6 32 6 24z',
    fat: 'M44 12c9 0 14 4 14 12s-5 12-14 12c5-3 7-7 7-12s-2-9-7-12z',
    lines: 'M16 12.500v23M26 12v24M36 12v24M45 24c0-4 5-4 5 0s-8 5-8-1',
  },
  braise: {
    flesh: 'M7 18l11-5 9 5v12l-10 5-10-5zM30 13l9-4 9 4v10l-9 4-9-4zM36 31l10-4 11 4v7l-10 4-11-4z',
    fat: 'M7 18l11-5 9 5-10 4zM30 13l9-4 9 4-9 4zM36 31l10-4 11 4-10 3z',
    lines: 'M17 22v12.500M39 17v10M47 34v8M12 24l2 1M43 20l2 1M22 28l2-1',
  },
  mince: {
    flesh: 'M7 33c-1-6 3-9 8-9 0-6 5-9 10-8 2-5 12-6 15 0 6-1 9 3 9 8 6 0 10 3 8 9-1 4-5 5-9 5H16c-4 0-8-1-9-5z',
    lines:
      'M14 31c3-3 6 3 9 0s6 3 9 0 6 3 9 0 6 3 9 0M22 24c3-3 5 3 8 0s5 3 8 0 4 2 6 0M27 19c2-2 4 2 6 0s3 1 4 0M12 38h40',
  },
};

/** What it looks like on the counter, by how it is cooked. Words beside it say the same. */
export function CutDrawing({ kind, size = 64 }: { kind: CutDrawingKind; size?: number }) {
  const { flesh, fat, lines } = shapes[kind];
  return (
    <svg className="w-drawing" width={size} height={(size * 44) / 64} viewBox="0 0 64 44" aria-hidden="true">
      <path className="w-drawing-flesh" d={flesh} />
      {fat ? <path className="w-drawing-fat" d={fat} /> : null}
      <path className="w-drawing-pen" d={flesh} />
      <path className="w-drawing-pen w-drawing-thin" d={lines} />
    </svg>
  );
}

/** The drawing for a way of cooking, the first of `grill or roast`; what has none of its own is shown as a braise. */
export function drawingOf(cooking: string): CutDrawingKind {
  const first = cooking.split(' or ')[0] ?? '';
  return isDrawn(first) ? first : 'braise';
}

function isDrawn(cooking: string): cooking is CutDrawingKind {
  return cooking in shapes;
}
