import { formatDay } from '#shared/domain/words.ts';
import { ChipGroup } from './chip-group.tsx';

type DayChoiceProps = {
  days: readonly { id: string; day: string; note?: string | undefined; disabled?: boolean }[];
  value: string | undefined;
  onChange: (dayId: string) => void;
  label?: string;
};

/** Which cutting day: chips with the day and, in small, what it still has. One day alone needs no choice. */
export function DayChoice({ days, value, onChange, label = 'Cutting day' }: DayChoiceProps) {
  if (days.length < 2) return null;
  return (
    <ChipGroup
      label={label}
      value={value}
      onChange={onChange}
      chips={days.map((day) => ({
        value: day.id,
        label: formatDay(day.day),
        note: day.note,
        ...(day.disabled ? { disabled: true } : {}),
      }))}
    />
  );
}
