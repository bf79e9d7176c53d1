import { niceTicks } from './chart-scale.ts';

type Bar = { value: number; words: string };
type BarGroup = { id: string; name: string; bars: readonly [Bar, Bar] };

type BarChartProps = {
  /** What is compared, as in `Contribution and deadweight value of each carcase`. */
  title: string;
  /** What the axis counts, with its unit. */
  axis: string;
  /** What the first and the second bar of each group stand for. */
  series: readonly [string, string];
  groups: readonly BarGroup[];
  /** Words of one tick of the axis. */
  tickWords: (value: number) => string;
};

const BAR = 16;
const GROUP = 68;
/** Percent of the width that bars may fill; their numbers stand behind them. */
const ROOM = 76;

/** Two bars for each name on one axis from nought, with their numbers; the table beside it says the same to listeners. */
export function BarChart({ title, axis, series, groups, tickWords }: BarChartProps) {
  const most = Math.max(0, ...groups.flatMap(({ bars }) => bars.map(({ value }) => value)));
  const ticks = niceTicks(most);
  const top = ticks.at(-1) ?? 1;
  const at = (value: number) => `${(Math.max(0, value) / top) * ROOM}%`;
  const height = groups.length * GROUP;
  return (
    <figure style={{ margin: 0 }}>
      <figcaption className="t-caps">{title}</figcaption>
      <p className="t-text t-small" style={{ margin: '4px 0 12px' }}>
        {`Upper bar, solid: ${series[0]}. Lower bar, outlined: ${series[1]}. ${axis}.`}
      </p>
      <svg
        width="100%"
        height={height + 44}
        role="img"
        aria-label={`${title}. ${groups.map((group) => sayGroup(group, series)).join(' ')}`}
      >
        {ticks.map((tick) => (
          <g key={tick}>
            <line x1={at(tick)} x2={at(tick)} y1={0} y2={height} style={{ stroke: 'var(--line)' }} />
            <text
              x={at(tick)}
              y={height + 18}
              className="t-small"
              textAnchor={tick === 0 ? 'start' : 'middle'}
              style={{ fill: 'var(--quiet)' }}
            >
              {tickWords(tick)}
            </text>
          </g>
        ))}
        {groups.map((group, index) => (
          <g key={group.id} transform={`translate(0 ${index * GROUP})`}>
            <text x={8} y={16} className="t-small" style={{ fill: 'var(--text)', fontWeight: 600 }}>
              {group.name}
            </text>
            {group.bars.map((bar, row) => (
              <g key={series[row]} transform={`translate(0 ${24 + row * (BAR + 4)})`}>
                <rect
                  width={at(bar.value)}
                  height={BAR}
                  style={
                    row === 0
                      ? { fill: 'var(--sold)' }
                      : { fill: 'var(--page)', stroke: 'var(--text)', strokeWidth: 1.5 }
                  }
                />
                <text
                  x={at(bar.value)}
                  dx={8}
                  y={BAR - 3}
                  className="t-small"
                  style={{ fill: 'var(--text)', fontVariantNumeric: 'tabular-nums' }}
                >
                  {bar.words}
                </text>
              </g>
            ))}
          </g>
        ))}
        <line x1={0} x2={0} y1={0} y2={height} style={{ stroke: 'var(--text)', strokeWidth: 2 }} />
        <text x={0} y={height + 38} className="t-small" style={{ fill: 'var(--quiet)' }}>
          {axis}
        </text>
      </svg>
    </figure>
  );
}

function sayGroup({ name, bars }: BarGroup, series: BarChartProps['series']): string {
  return `${name}: ${series[0]} ${bars[0].words}, ${series[1]} ${bars[1].words}.`;
}
