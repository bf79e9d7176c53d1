import { Redirect, Slot, usePathname } from 'expo-router';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import type { NavItem } from '#components/ui/nav-link.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TradeShell } from '#components/ui/trade-shell.tsx';
import { useMe } from '#hooks/me.ts';
import { useFarmName } from '#hooks/office.ts';
import { useTradeAccount } from '#hooks/trade.ts';
import { usePageStart } from '#hooks/use-page-start.ts';
import { useSignOut } from '#hooks/use-sign-out.ts';

const butcherPlaces: readonly NavItem[] = [
  { label: 'Coming carcases', href: '/trade/carcases' },
  { label: 'Reservations', href: '/trade/reservations' },
];
const applicantPlaces: readonly NavItem[] = [{ label: 'Trade account', href: '/trade/apply' }];

/** The trade area opens to anyone signed in; without an approved account there is the application alone. */
export default function TradeLayout() {
  const path = usePathname();
  const me = useMe();
  return (
    <StateView query={me} what="your account" waiting={<Door />}>
      {({ user }) => {
        if (!user) return <Redirect href={`/account/sign-in?next=${encodeURIComponent(path)}`} />;
        if (user.role === 'owner' || user.role === 'packer') return <ForButchers />;
        return <Counter path={path} isButcher={user.role === 'butcher'} />;
      }}
    </StateView>
  );
}

function Counter({ path, isButcher }: { path: string; isButcher: boolean }) {
  const farmName = useFarmName();
  const account = useTradeAccount();
  const { signOut } = useSignOut();
  usePageStart(path);
  const isAway = !isButcher && path !== '/trade/apply';
  return (
    <TradeShell
      farmName={farmName}
      homeHref={isButcher ? '/trade/carcases' : '/trade/apply'}
      path={path}
      links={isButcher ? butcherPlaces : applicantPlaces}
      business={account.data?.account?.businessName}
      onSignOut={signOut}
    >
      {isAway ? <Redirect href="/trade/apply" /> : <Slot />}
    </TradeShell>
  );
}

function Door() {
  return (
    <View style={css('w-page', 'w-main')}>
      <Skeleton shape="rows" count={4} />
    </View>
  );
}

function ForButchers() {
  return (
    <View role="main" style={css('w-page', 'w-main')}>
      <EmptyState
        level={1}
        title="This is the butchers' side of the counter"
        words="Reservations and trade accounts are looked after in the office."
      >
        <ButtonLink href="/office" label="To the office" kind="quiet" />
      </EmptyState>
    </View>
  );
}
