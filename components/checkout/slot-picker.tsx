import { View } from 'react-native';
import type { CollectionPoint } from '#shared/contracts/shop.ts';
import { londonDay } from '#shared/domain/day.ts';
import { formatDay, formatTime } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { ChipGroup } from '#components/ui/chip-group.tsx';
import { FieldError } from '#components/ui/field-frame.tsx';
import { RadioGroup } from '#components/ui/radio-group.tsx';
import { Text } from '#components/ui/text.tsx';

type SlotPickerProps = {
  points: readonly CollectionPoint[];
  pointId: string | undefined;
  onPoint: (pointId: string) => void;
  slotId: string;
  onSlot: (slotId: string) => void;
  error: string | undefined;
};

/** Fewer places than this are said: it helps to decide. */
const FEW = 4;

/** Where, then when: the places with their addresses, then the times of each day with the room that is left. */
export function SlotPicker({ points, pointId, onPoint, slotId, onSlot, error }: SlotPickerProps) {
  const point = points.find((one) => one.id === pointId);
  return (
    <View style={css('w-section')}>
      <RadioGroup
        label="Where will you collect it?"
        ruled
        value={pointId}
        choices={points.map((one) => ({
          value: one.id,
          label: one.name,
          note: one.addressLines.join(', '),
          disabled: one.slots.every((slot) => slot.free === 0),
          end: one.slots.every((slot) => slot.free === 0) ? 'full' : undefined,
        }))}
        onChange={onPoint}
      />
      {point ? (
        <>
          <Text size="small" tone="quiet">
            {point.directions}
          </Text>
          {slotDays(point).map(({ day, slots }) => (
            <ChipGroup
              key={day}
              grid
              label={`When, on ${formatDay(day)}?`}
              value={slotId}
              chips={slots.map((slot) => ({
                value: slot.id,
                label: `${formatTime(slot.startsAt)}–${formatTime(slot.endsAt)}`,
                note: roomWords(slot.free),
                disabled: slot.free === 0 && slot.id !== slotId,
              }))}
              onChange={onSlot}
            />
          ))}
        </>
      ) : null}
      <FieldError id="slot-error" error={error} />
    </View>
  );
}

function slotDays(point: CollectionPoint) {
  const days = [...new Set(point.slots.map((slot) => londonDay(slot.startsAt)))].sort();
  return days.map((day) => ({ day, slots: point.slots.filter((slot) => londonDay(slot.startsAt) === day) }));
}

function roomWords(free: number): string {
  if (free === 0) return 'full';
  return free < FEW ? `${free} ${free === 1 ? 'place' : 'places'} left` : 'free';
}
