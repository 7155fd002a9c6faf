import { useQuery } from '@tanstack/react-query';
import { useDeferredValue, useState } from 'react';
import * as z from 'zod';
import { readBuilt } from '#src/lib/api.ts';
import { Caution } from '#src/ui/caution.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { Cautions } from './cautions.tsx';
import { Section } from './section.tsx';

const notices = z.array(z.object({ name: z.string(), version: z.string(), licence: z.string(), text: z.string() }));
type Notice = z.output<typeof notices>[number];

// Whoever runs a changed version sets it when building: the licence asks for the source of what runs here.
const source: unknown = import.meta.env['VITE_SOURCE_URL'];

export function Component() {
  return (
    <Page title="Licences and cautions" width="text">
      <Caution>
        <Cautions />
      </Caution>
      <Section title="Ovenbird">
        <p>
          Ovenbird is free software: you may run it, pass it on and change it under the GNU Affero General Public
          License, version 3 or, as you choose, any later one (AGPL-3.0-or-later). It comes without any warranty.
        </p>
        <p>
          Whoever uses it over a network has a right to the source of the version that runs there.{' '}
          {typeof source === 'string' && source !== '' ? (
            <a href={source} className="link wrap-anywhere" rel="noreferrer">
              Get the source
            </a>
          ) : (
            'It came to this machine as source; ask whoever runs this server for it.'
          )}{' '}
          The whole licence stands in the file LICENSE at its top, and at{' '}
          <a href="https://www.gnu.org/licenses/agpl-3.0.html" className="link" rel="noreferrer">
            gnu.org
          </a>
          .
        </p>
      </Section>
      <Section title="What it is built on">
        <Notices />
      </Section>
    </Page>
  );
}

function Notices() {
  const built = useQuery({
    queryKey: ['licences'],
    queryFn: async ({ signal }) => notices.parse(await readBuilt('/licences.json', signal)),
    staleTime: Infinity,
  });
  const [typed, setTyped] = useState('');
  const wanted = useDeferredValue(typed.trim().toLowerCase());
  if (built.isPending) return <SkeletonLines lines={8} label="Loading the notices" />;
  if (built.isError)
    return (
      <ErrorNote
        error={built.error}
        what="The notices are made when the pages are built, and are not here."
        retry={() => void built.refetch()}
      />
    );
  const found = built.data.filter(({ name, licence }) => `${name} ${licence}`.toLowerCase().includes(wanted));
  return (
    <>
      <p>{built.data.length} packages by others, each under its own licence. Thanks to everybody who wrote them.</p>
      <TextField
        label="Search"
        hideLabel
        type="search"
        placeholder="Name or licence"
        data-search
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
      />
      <p role="status" className="text-xs text-muted">
        {found.length === built.data.length ? 'All are listed.' : `${found.length} of ${built.data.length} are listed.`}
      </p>
      <ul>
        {found.map((notice) => (
          <OneNotice key={`${notice.name}@${notice.version}`} notice={notice} />
        ))}
      </ul>
    </>
  );
}

/** The text is drawn only when asked for: there are hundreds. */
function OneNotice({ notice: { name, version, licence, text } }: { notice: Notice }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <li className="border-t border-line">
      <details onToggle={(event) => setOpen(event.currentTarget.open)}>
        <summary className="flex min-h-control flex-wrap items-center gap-x-3 py-1">
          <span className="font-semibold wrap-anywhere">{name}</span>
          <span className="figures text-muted">{version}</span>
          <span className="ml-auto text-muted">{licence}</span>
        </summary>
        {isOpen && (
          <pre className="mb-3 max-h-96 overflow-auto rounded bg-paper p-3 text-xs whitespace-pre-wrap">
            {text || 'The package carries no text of its own beyond the name of its licence.'}
          </pre>
        )}
      </details>
    </li>
  );
}
