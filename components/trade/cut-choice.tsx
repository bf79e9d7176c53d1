import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { NumberField } from '#components/ui/number-field.tsx';
import { Text } from '#components/ui/text.tsx';
import type { ReservationLineRequest, TradeDay } from '#shared/contracts/trade.ts';
import { formatRate, formatWeight } from '#shared/domain/words.ts';
import { setCutGrams } from './trade-words.ts';

type CutChoiceProps = {
  cuts: TradeDay['cuts'];
  lines: readonly ReservationLineRequest[];
  onChange: (lines: ReservationLineRequest[]) => void;
};

/** Kilograms of single cuts, at the butcher's own prices. */
export function CutChoice({ cuts, lines, onChange }: CutChoiceProps) {
  if (cuts.length === 0) return <Text tone="quiet">No price is agreed for single cuts.</Text>;
  return (
    <View style={css('w-fields')}>
      {cuts.map((cut) => {
        const line = lines.find((one) => one.kind === 'cut' && one.cutId === cut.cutId);
        const grams = line?.kind === 'cut' ? line.grams : null;
        return (
          <NumberField
            key={cut.cutId}
            unit="kilograms"
            label={cut.name}
            hint={`${formatRate(cut.tenthPencePerKg)}, of about ${formatWeight(cut.madeGrams)}`}
            required={false}
            value={grams}
            error={grams !== null && (Number.isNaN(grams) || grams <= 0) ? 'The weight must be above zero.' : undefined}
            onChange={(next) => onChange(setCutGrams(lines, cut.cutId, next))}
          />
        );
      })}
    </View>
  );
}
