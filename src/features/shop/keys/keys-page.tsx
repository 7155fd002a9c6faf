import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { KeyRound } from 'lucide-react';
import { useState } from 'react';
import { listApiKeys, revokeApiKey, type ApiKey } from '#contracts/api-keys.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ConfirmDialog } from '#src/ui/dialog.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { NewKeyDialog } from './new-key-dialog.tsx';

export function Component() {
  const { role } = useShop();
  if (may.setUp(role)) return <Keys />;
  return (
    <Page title="API keys" width="text">
      <p>Only owners see this page. Ask one of them for a key.</p>
    </Page>
  );
}

function Keys() {
  const shop = useShop();
  const keys = useQuery({
    queryKey: shopKey(shop.id, 'setup', 'api-keys'),
    queryFn: ({ signal }) => call(listApiKeys, { params: { shopId: shop.id }, signal }),
  });
  const [making, setMaking] = useState(false);
  const [ending, setEnding] = useState<ApiKey | null>(null);
  const make = (
    <Button look="primary" icon={<KeyRound size={16} aria-hidden="true" />} onClick={() => setMaking(true)}>
      New key
    </Button>
  );
  return (
    <Page title="API keys" about="For loggers that send air readings" actions={make}>
      {keys.isPending && <SkeletonLines lines={4} label="Loading the keys" />}
      {keys.isError && (
        <ErrorNote error={keys.error} what="The keys could not be loaded." retry={() => void keys.refetch()} />
      )}
      {keys.data?.keys.length === 0 && (
        <EmptyState title="No key yet" action={make}>
          A logger or a small program in the shop sends its readings with a key. It can write air readings and nothing
          else, and read nothing.
        </EmptyState>
      )}
      {keys.data && keys.data.keys.length > 0 && <KeyTable keys={keys.data.keys} onEnd={setEnding} />}
      <HowTo />
      {making && <NewKeyDialog onClose={() => setMaking(false)} />}
      {ending && <RevokeDialog apiKey={ending} onClose={() => setEnding(null)} />}
    </Page>
  );
}

function KeyTable({ keys, onEnd }: { keys: readonly ApiKey[]; onEnd: (key: ApiKey) => void }) {
  const formats = useFormats();
  return (
    <Table label="API keys">
      <thead>
        <tr>
          <Th>What it is for</Th>
          <Th>Key</Th>
          <Th>Made</Th>
          <Th>Last used</Th>
          <Th>
            <span className="sr-only">Deeds</span>
          </Th>
        </tr>
      </thead>
      <tbody>
        {keys.map((key) => (
          <tr key={key.id} className={key.revokedAt === null ? undefined : 'text-muted'}>
            <Td className="font-semibold">{key.label}</Td>
            <Td className="font-mono text-xs whitespace-nowrap">ovk_…{key.hint}</Td>
            <Td className="figures whitespace-nowrap">
              {formats.dateTime(key.createdAt)}
              {key.createdBy && <span className="text-muted">, {key.createdBy}</span>}
            </Td>
            <Td className="figures whitespace-nowrap">
              {key.lastUsedAt === null ? 'never' : formats.dateTime(key.lastUsedAt)}
            </Td>
            <Td className="text-right">
              {key.revokedAt === null ? (
                <Button size="small" aria-label={`Revoke ${key.label}`} onClick={() => onEnd(key)}>
                  Revoke
                </Button>
              ) : (
                <Badge>revoked {formats.date(key.revokedAt)}</Badge>
              )}
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function RevokeDialog({ apiKey, onClose }: { apiKey: ApiKey; onClose: () => void }) {
  const shop = useShop();
  const client = useQueryClient();
  const revoke = useMutation({
    mutationFn: () => call(revokeApiKey, { params: { shopId: shop.id, keyId: apiKey.id }, body: {} }),
    onSuccess: () => {
      showToast(`${apiKey.label}: the key opens nothing any more`, { tone: 'good' });
      onClose();
    },
    onSettled: () => client.invalidateQueries({ queryKey: shopKey(shop.id, 'setup') }),
  });
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Revoke the key “${apiKey.label}”?`}
      about="Whatever sends with it is turned away from now on. This cannot be taken back; what it has sent stays."
      deed="Revoke the key"
      busy={revoke.isPending}
      onConfirm={() => revoke.mutate()}
    >
      {revoke.error && <ErrorNote error={revoke.error} what="The key is still good." />}
    </ConfirmDialog>
  );
}

function HowTo() {
  return (
    <section aria-labelledby="how-to" className="flex flex-col gap-2">
      <h2 id="how-to" className="text-base">
        How a logger sends
      </h2>
      <pre tabIndex={0} className="card overflow-x-auto p-3 text-xs">
        {`curl ${location.origin}/api/readings \\
  -H 'Authorization: Bearer ovk_...' -H 'Content-Type: application/json' \\
  -d '{"id":"'$(uuidgen)'","zone":"Booth 1","at":"'$(date -u +%FT%TZ)'","celsius":21.4,"humidity":48}'`}
      </pre>
      <p className="text-muted">
        One reading, or a list of up to 500; at most 60 requests a minute. The id makes sending twice harmless: a
        reading that is there already is counted as a duplicate. All of a list is taken, or none of it.
      </p>
    </section>
  );
}
