import { Pressable, View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { halfEmsOf, holds, type RailColumn, type RailGeometry } from './rail-geometry.ts';
import { describePrimal, type RailMode } from './rail-words.ts';

type RailLineProps = {
  /** Sets the buttons of this line apart from those of other lines on the page. */
  id: string;
  geometry: RailGeometry;
  mode: RailMode;
  chosenId: string | undefined;
  onChoose: (id: string) => void;
  visibleWhen: 'always' | 'narrow' | 'wide';
};

/** One heavy line with its primals. The Tab key stops once; the arrow keys walk along the rail. */
export function RailLine({ id, geometry, mode, chosenId, onChoose, visibleWhen }: RailLineProps) {
  const { columns, lengthPercent } = geometry;
  const chosenAt = columns.findIndex((column) => holds(column.primal, chosenId));
  const walk = (from: number, key: string) => {
    const step = key === 'ArrowRight' ? 1 : key === 'ArrowLeft' ? -1 : 0;
    const next = columns[from + step];
    if (step === 0 || !next) return false;
    onChoose(next.primal.id);
    document.getElementById(buttonId(id, next))?.focus();
    return true;
  };
  return (
    <View style={[css('rail-line', visibleWhen !== 'always' && `rail-${visibleWhen}`), { width: `${lengthPercent}%` }]}>
      {columns.map((column, at) => (
        <Pressable
          key={column.primal.id}
          id={buttonId(id, column)}
          role="button"
          aria-label={describePrimal(column, mode)}
          aria-pressed={at === chosenAt}
          tabIndex={at === Math.max(chosenAt, 0) ? 0 : -1}
          onPress={() => onChoose(column.primal.id)}
          onKeyDown={(event) => {
            if (walk(at, event.key)) event.preventDefault();
          }}
          style={[css('rail-primal', at === chosenAt && 'rail-chosen'), { flexGrow: column.primal.grams }]}
        >
          <span className="w-hook" />
          <Bar column={column} mode={mode} />
          <Label column={column} />
        </Pressable>
      ))}
    </View>
  );
}

function buttonId(lineId: string, column: RailColumn): string {
  return `${lineId}-${column.primal.id}`;
}

function Bar({ column, mode }: { column: RailColumn; mode: RailMode }) {
  return (
    <span className="rail-bar">
      <span className="rail-sold" style={{ height: `${column.soldPercent}%` }} />
      <span className="rail-held" style={{ height: `${column.heldPercent}%` }} />
      {column.freeGrams > 0 ? <span className={mode === 'takes' ? 'rail-rest' : 'rail-free'} /> : null}
    </span>
  );
}

/** The name where it fits, else the short name where that fits, else nothing: the stylesheet decides. */
function Label({ column: { primal } }: { column: RailColumn }) {
  const full = halfEmsOf(primal.name);
  const short = halfEmsOf(primal.shortName);
  return (
    <span className="rail-label">
      <span className={`rail-fit-${full}`}>{primal.name}</span>
      {short < full ? <span className={`rail-fit-${short} rail-else-${full}`}>{primal.shortName}</span> : null}
    </span>
  );
}
