import type { Day } from '#shared/domain/day.ts';
import { formatDay, formatDayWithYear } from '#shared/domain/words.ts';

/** `Fri 12 Dec`, for people and machines alike. Takes the looks of the text that it stands in. */
export function DayText({ day, year = false }: { day: Day; year?: boolean }) {
  return (
    <time dateTime={day} className="t-nowrap">
      {year ? formatDayWithYear(day) : formatDay(day)}
    </time>
  );
}
