import { railWords, type RailMode } from './rail-words.ts';

/** What the fills mean. Rails that stand in one stack share one legend. */
export function RailLegend({ mode = 'sales', held = mode === 'sales' }: { mode?: RailMode; held?: boolean }) {
  const words = railWords[mode];
  return (
    <div className="rail-legend">
      <Key fill="rail-sold" word={words.sold} />
      {held ? <Key fill="rail-held" word={words.held} /> : null}
      <Key fill={mode === 'takes' ? 'rail-rest' : 'rail-free'} word={words.rest} />
    </div>
  );
}

function Key({ fill, word }: { fill: string; word: string }) {
  return (
    <span className="rail-key">
      <span className={`rail-swatch ${fill}`} aria-hidden="true" />
      {word}
    </span>
  );
}
