import { Redirect, Slot, usePathname } from 'expo-router';
import { View } from 'react-native';
import { mayOpen, placesFor } from '#components/office/places.ts';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { OfficeShell } from '#components/ui/office-shell.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { useMe } from '#hooks/me.ts';
import { useFarmName } from '#hooks/office.ts';
import { usePageStart } from '#hooks/use-page-start.ts';
import { useSignOut } from '#hooks/use-sign-out.ts';

/** The office opens to those who work on the farm; the API asks again at every call. */
export default function OfficeLayout() {
  const path = usePathname();
  const me = useMe();
  const farmName = useFarmName();
  const { signOut } = useSignOut();
  usePageStart(path);
  return (
    <StateView query={me} what="your account" waiting={<Door />}>
      {({ user }) => {
        if (!user) return <Redirect href={`/account/sign-in?next=${encodeURIComponent(path)}`} />;
        const links = placesFor(user.role);
        if (links.length === 0) return <NotYours isButcher={user.role === 'butcher'} />;
        return (
          <OfficeShell
            farmName={farmName}
            homeHref={links[0]?.href ?? '/office'}
            path={path}
            links={links}
            person={user.name}
            onSignOut={signOut}
          >
            {mayOpen(user.role, path) ? <Slot /> : <OwnersOnly />}
          </OfficeShell>
        );
      }}
    </StateView>
  );
}

function Door() {
  return (
    <View style={css('w-page', 'w-main')}>
      <Skeleton shape="rows" count={4} />
    </View>
  );
}

function NotYours({ isButcher }: { isButcher: boolean }) {
  return (
    <View role="main" style={css('w-page', 'w-main')}>
      <EmptyState
        level={1}
        title="This is the farm's office"
        words="It opens to those who work on the farm. Your own account has its own place."
      >
        <ButtonLink
          href={isButcher ? '/trade' : '/account'}
          label={isButcher ? 'To the trade area' : 'To your account'}
          kind="quiet"
        />
      </EmptyState>
    </View>
  );
}

function OwnersOnly() {
  return (
    <EmptyState
      level={1}
      title="This page is for the owner"
      words="Packing and the run sheet of each cutting day are yours."
    >
      <ButtonLink href="/office/cutting-days" label="To the cutting days" kind="quiet" />
    </EmptyState>
  );
}
