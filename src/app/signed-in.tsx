import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { Navigate, Outlet, useLocation, useNavigate } from 'react-router-dom';
import type { Me } from '#contracts/session.ts';
import { formatsFor } from '#src/lib/formats.ts';
import { useLive } from '#src/lib/live.ts';
import { meQuery, rememberedShop, rememberShop, ShopContext } from '#src/lib/session.ts';
import { paths } from './paths.ts';
import { Overlays } from './overlays.tsx';
import { NoShop } from './no-shop.tsx';
import { PageSkeleton } from './page-skeleton.tsx';

/** Around every page that needs an account: leads to the sign-in when the session ends, and settles on a shop. */
export function Component() {
  const { data: me } = useQuery(meQuery);
  const { pathname, search, hash } = useLocation();
  const navigate = useNavigate();
  if (me === undefined) return <PageSkeleton />;
  if (me === null)
    return (
      <>
        <Navigate to={paths.signIn(pathname + search + hash)} replace />
        <PageSkeleton />
      </>
    );
  if (me.shops.length === 0) return <NoShop me={me} onOpened={() => void navigate(paths.firstSteps())} />;
  return <InShop me={me} />;
}

function InShop({ me }: { me: Me }) {
  const [chosen, setChosen] = useState(rememberedShop);
  const shop = me.shops.find(({ id }) => id === chosen) ?? me.shops[0]!;
  const { clock, temperatureUnit: unit } = me.account;
  useLive(shop.id);
  const choice = useMemo(
    () => ({
      shop,
      formats: formatsFor({ zone: shop.timeZone, clock, unit }),
      choose: (shopId: string) => {
        rememberShop(shopId);
        setChosen(shopId);
      },
    }),
    [shop, clock, unit],
  );
  return (
    <ShopContext value={choice}>
      <Overlays>
        {/* Another shop is another world: nothing of a page's state may carry over. */}
        <Outlet key={shop.id} />
      </Overlays>
    </ShopContext>
  );
}
