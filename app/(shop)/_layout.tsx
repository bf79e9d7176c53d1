import { Slot, usePathname } from 'expo-router';
import { FARM_MARK, shopPlaces } from '#components/shop/places.ts';
import { ShopShell } from '#components/ui/shop-shell.tsx';
import { countOf, useBasket } from '#hooks/use-basket.ts';
import { usePageStart } from '#hooks/use-page-start.ts';

export default function ShopLayout() {
  const path = usePathname();
  const basket = useBasket();
  usePageStart(path);
  return (
    <ShopShell
      farmName={FARM_MARK}
      homeHref="/"
      basketHref="/basket"
      basketCount={countOf(basket)}
      path={path}
      links={shopPlaces}
    >
      <Slot />
    </ShopShell>
  );
}
