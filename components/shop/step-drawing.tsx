export type StepDrawingKind = 'choose' | 'cut' | 'collect';

/** Drawn on a grid of 72: two sides on the rail, a knife and its cut, a box in two hands' reach. */
export function StepDrawing({ kind }: { kind: StepDrawingKind }) {
  return (
    <svg className="w-drawing" width={72} height={72} viewBox="0 0 72 72" aria-hidden="true">
      {kind === 'choose' ? <Sides /> : kind === 'cut' ? <Knife /> : <Box />}
    </svg>
  );
}

function Sides() {
  const side = 'M0 0c6 4 8 10 7 17-1 6 3 9 3 16 0 8-5 13-9 15-5-3-8-9-7-16 0-7-3-9-3-15 0-8 4-14 9-17z';
  return (
    <>
      <path className="w-drawing-pen" d="M4 8h64M23 8v5c0 4-6 4-6 0M51 8v5c0 4-6 4-6 0" strokeWidth={3} />
      <g transform="translate(20 18)">
        <path className="w-drawing-flesh" d={side} />
        <path className="w-drawing-pen" d={side} />
        <path className="w-drawing-pen w-drawing-thin" d="M-4 15c3 2 7 2 10 1M-3 22c3 2 6 2 9 2M-4 31c3 2 9 2 12 0" />
      </g>
      <g transform="translate(49 18)">
        <path className="w-drawing-plain" d={side} />
        <path className="w-drawing-pen" d={side} strokeDasharray="3 4" />
      </g>
    </>
  );
}

function Knife() {
  return (
    <>
      <path className="w-drawing-plain" d="M6 50h60v10H6z" />
      <path className="w-drawing-pen" d="M6 50h60v10H6z" />
      <path className="w-drawing-flesh" d="M12 50c-2-10 3-17 12-17h10v17zM39 50V33c10 0 20 6 20 17z" />
      <path className="w-drawing-pen" d="M12 50c-2-10 3-17 12-17h10v17zM39 50V33c10 0 20 6 20 17z" />
      <path className="w-drawing-pen w-drawing-thin" d="M18 41c3-2 7-2 10 0M45 41c3-1 6 0 8 2" />
      <path className="w-drawing-plain" d="M36.500 46L30 24c-1-6 0-11 3-15h7c1 6 0 11-1 15z" />
      <path className="w-drawing-pen" d="M36.500 46L30 24c-1-6 0-11 3-15h7c1 6 0 11-1 15zM34 9V2h5v7" />
    </>
  );
}

function Box() {
  return (
    <>
      <path className="w-drawing-flesh" d="M18 25c2-6 10-8 16-5 6-4 16-2 19 5z" />
      <path className="w-drawing-pen" d="M18 25c2-6 10-8 16-5 6-4 16-2 19 5M30 25c1-3 4-4 7-4" />
      <path className="w-drawing-plain" d="M9 25h54v32H9z" />
      <path className="w-drawing-pen" d="M9 25h54v32H9zM9 33h54M29 25v8M43 25v8" />
      <path className="w-drawing-pen w-drawing-thin" d="M28 42h16M31 47h10M28 42v9h16v-9" />
      <path className="w-drawing-pen" d="M4 64h64" />
    </>
  );
}
