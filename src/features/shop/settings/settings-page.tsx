import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { may, meQuery, useShop } from '#src/lib/session.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { settingsQuery } from '../parts/set-up-queries.ts';
import { ToldClashes } from '../parts/told-clashes.tsx';
import { MailCard } from './mail-card.tsx';
import { ShopFormCard } from './shop-form.tsx';

export function Component() {
  const { role } = useShop();
  if (may.plan(role)) return <Settings />;
  return (
    <Page title="Shop" width="text">
      <p>Only leads and owners see this page. Ask one of them if you need something from it.</p>
    </Page>
  );
}

function Settings() {
  const shop = useShop();
  const mayWrite = may.setUp(shop.role);
  const settings = useQuery(settingsQuery(shop.id));
  const client = useQueryClient();
  const [told, setTold] = useState<Clash[]>([]);
  const [round, setRound] = useState(0);
  return (
    <Page title="Shop" about={mayWrite ? shop.name : `${shop.name}; owners change this`}>
      {settings.isPending && <SkeletonLines lines={10} label="Loading the settings" />}
      {settings.isError && (
        <ErrorNote
          error={settings.error}
          what="The settings could not be loaded."
          retry={() => void settings.refetch()}
        />
      )}
      <ToldClashes what="The change" clashes={told} onClose={() => setTold([])} />
      {settings.data && (
        <ShopFormCard
          key={round}
          settings={settings.data}
          mayWrite={mayWrite}
          onSaved={({ shop: saved, clashes }) => {
            client.setQueryData(settingsQuery(shop.id).queryKey, saved);
            // Name and zone stand in the shell, and every time is written in that zone.
            void client.invalidateQueries({ queryKey: meQuery.queryKey });
            setTold(clashes);
            // The form begins anew with what was saved.
            setRound(round + 1);
            showToast('The settings are saved', { tone: 'good' });
          }}
        />
      )}
      {settings.data?.mail && <MailCard mail={settings.data.mail} />}
    </Page>
  );
}
