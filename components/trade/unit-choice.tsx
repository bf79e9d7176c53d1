import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Text } from '#components/ui/text.tsx';
import type { ReservationLineRequest, TradeCarcase } from '#shared/contracts/trade.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import { formatMoney, formatRate, formatWeight } from '#shared/domain/words.ts';
import { findUnitLine, nameBeast, toggleUnit } from './trade-words.ts';

type Side = TradeCarcase['sides'][number];
type Unit = Side['units'][number];

type UnitChoiceProps = {
  carcase: TradeCarcase;
  lines: readonly ReservationLineRequest[];
  onChange: (lines: ReservationLineRequest[]) => void;
};

/** What of one beast can be taken whole: sides and quarters at once, primals when asked for. */
export function UnitChoice({ carcase, lines, onChange }: UnitChoiceProps) {
  return (
    <View style={css('w-columns')}>
      {carcase.sides.map((side) => {
        const priced = side.units.filter((unit) => unit.tenthPencePerKg !== null);
        const primals = priced.filter((unit) => unit.unitKind.startsWith('primal:'));
        const row = (unit: Unit) => (
          <UnitRow key={unit.unitKind} carcase={carcase} side={side} unit={unit} lines={lines} onChange={onChange} />
        );
        return (
          <View
            key={side.side}
            role="group"
            aria-label={`${nameBeast(carcase)}, ${side.side} side`}
            style={css('w-stack-s')}
          >
            <Text weight="strong">{`${side.side === 'left' ? 'Left' : 'Right'} side`}</Text>
            {priced.length === 0 ? <Text tone="quiet">No price is agreed for sides, quarters or primals.</Text> : null}
            {priced.filter((unit) => !primals.includes(unit)).map(row)}
            {primals.length > 0 ? <Disclosure words="Primals">{primals.map(row)}</Disclosure> : null}
          </View>
        );
      })}
    </View>
  );
}

type UnitRowProps = UnitChoiceProps & { side: Side; unit: Unit };

function UnitRow({ carcase, side, unit, lines, onChange }: UnitRowProps) {
  const line = { kind: 'unit' as const, unitKind: unit.unitKind, carcaseId: carcase.id, side: side.side };
  const refused = unit.isTaken ? 'Taken already.' : unit.closedReason;
  const rate = unit.tenthPencePerKg ?? 0;
  return (
    <Checkbox
      label={`${unit.name}, ${formatWeight(unit.grams)}`}
      note={refused ?? `${formatRate(rate)}, about ${formatMoney(priceForWeight(unit.grams, rate))}`}
      checked={findUnitLine(lines, line) !== undefined}
      disabled={refused !== null}
      onChange={() => onChange(toggleUnit(lines, line))}
    />
  );
}
