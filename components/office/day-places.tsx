import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { NavLink } from '#components/ui/nav-link.tsx';
import type { Role } from '#shared/domain/roles.ts';
import { dayPlaces } from './places.ts';

/** From one page of a cutting day to the others. */
export function DayPlaces({ dayId, role, path }: { dayId: string; role: Role; path: string }) {
  return (
    <View role="navigation" aria-label="This cutting day" style={css('w-strip', 'w-no-print')}>
      <View style={css('w-nav')}>
        {dayPlaces(dayId, role).map((place) => (
          <NavLink key={place.label} {...place} current={path === place.href} />
        ))}
      </View>
    </View>
  );
}
