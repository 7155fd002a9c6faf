import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Copy } from 'lucide-react';
import { useId, useState } from 'react';
import { v7 } from 'uuid';
import { createApiKey } from '#contracts/api-keys.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';

/** Makes a key and shows it, once. */
export function NewKeyDialog({ onClose }: { onClose: () => void }) {
  const shop = useShop();
  const client = useQueryClient();
  const formId = useId();
  const [id] = useState(() => v7());
  const [label, setLabel] = useState('');
  const [tried, setTried] = useState(false);
  const make = useMutation({
    mutationFn: () => call(createApiKey, { params: { shopId: shop.id }, body: { id, label: label.trim() } }),
    onSettled: () => client.invalidateQueries({ queryKey: shopKey(shop.id, 'setup') }),
  });
  const secret = make.data?.secret;
  const fault =
    label.trim() === '' ? 'Say what sends with it.' : label.trim().length > 80 ? 'At most 80 characters.' : '';
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={secret === undefined ? 'A new key' : `The key “${label.trim()}”`}
      about={
        secret === undefined
          ? 'One for each logger, so that one can be revoked without the others.'
          : 'It is shown this once. Put it where the logger keeps it; nobody can look it up later.'
      }
      actions={
        secret === undefined ? (
          <>
            <Button onClick={onClose}>Leave it</Button>
            <Button type="submit" form={formId} look="primary" busy={make.isPending}>
              Make the key
            </Button>
          </>
        ) : (
          <Button look="primary" onClick={onClose}>
            I have put it away
          </Button>
        )
      }
    >
      {secret === undefined ? (
        <form
          id={formId}
          noValidate
          className="flex flex-col gap-4"
          onSubmit={(event) => {
            event.preventDefault();
            setTried(true);
            if (fault === '') make.mutate();
          }}
        >
          <TextField
            label="What it is for"
            hint="Logger in booth 1"
            autoComplete="off"
            error={tried ? fault : ''}
            value={label}
            onChange={(event) => setLabel(event.target.value)}
          />
          {make.error && <ErrorNote error={make.error} what="No key was made." />}
        </form>
      ) : (
        <div className="flex flex-col gap-3">
          <code tabIndex={0} className="block rounded border border-edge bg-paper p-3 text-sm break-all select-all">
            {secret}
          </code>
          <Button icon={<Copy size={16} aria-hidden="true" />} className="self-start" onClick={() => void copy(secret)}>
            Copy
          </Button>
        </div>
      )}
    </Dialog>
  );
}

async function copy(text: string): Promise<void> {
  try {
    await navigator.clipboard.writeText(text);
    showToast('Copied');
  } catch {
    showToast('It could not be copied: mark it and copy it by hand.', { tone: 'bad' });
  }
}
