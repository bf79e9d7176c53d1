import { Redirect } from 'expo-router';
import { placesFor } from '#components/office/places.ts';
import { useMe } from '#hooks/me.ts';

/** The first place of whoever comes in. */
export default function OfficeStart() {
  const me = useMe();
  const first = placesFor(me.data?.user?.role ?? 'customer')[0];
  return first ? <Redirect href={first.href} /> : null;
}
