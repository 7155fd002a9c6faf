import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import type { ReplyOf } from '#contracts/endpoint.ts';
import { listMailbox } from '#contracts/mailbox.ts';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { cx } from '#src/lib/cx.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { localMoment } from './local-moment.ts';
import { MailboxLetter } from './mailbox-letter.tsx';

/** Letters that the local mail server kept, where one runs. Works without an account: reset letters arrive here too. */
export function Component() {
  const [search] = useSearchParams();
  const chosen = search.get('letter');
  const mailbox = useQuery({
    queryKey: ['mailbox'],
    queryFn: ({ signal }) => call(listMailbox, { signal }),
    refetchInterval: 5_000,
  });
  const isElsewhere = isApiError(mailbox.error, 'not-found');
  return (
    <Page
      title="Local mailbox"
      about="No mail server is set, so letters stay on this machine."
      actions={<Button onClick={() => void mailbox.refetch()}>Look again</Button>}
    >
      {mailbox.isPending && <SkeletonLines lines={6} label="Loading the letters" />}
      {isElsewhere && (
        <EmptyState title="There is no local mailbox here">
          <p>Letters leave by a mail server, or this page was opened from another machine than the server's own.</p>
        </EmptyState>
      )}
      {mailbox.isError && !isElsewhere && <ErrorNote error={mailbox.error} retry={() => void mailbox.refetch()} />}
      {mailbox.data?.letters.length === 0 && (
        <EmptyState title="No letters yet">
          <p>Invitations, new passwords and news of a changed plan will be here, as their readers would get them.</p>
        </EmptyState>
      )}
      {mailbox.data && mailbox.data.letters.length > 0 && (
        <div className="grid items-start gap-4 md:grid-cols-[20rem_minmax(0,1fr)]">
          <LetterList letters={mailbox.data.letters} chosen={chosen} />
          {chosen === null ? (
            <p className="card hidden p-6 text-center text-muted md:block">Choose a letter to read it.</p>
          ) : (
            <MailboxLetter key={chosen} letterId={chosen} />
          )}
        </div>
      )}
    </Page>
  );
}

type Head = ReplyOf<typeof listMailbox>['letters'][number];

function LetterList({ letters, chosen }: { letters: Head[]; chosen: string | null }) {
  return (
    <nav aria-label="Letters" className={cx('card max-h-[75dvh] overflow-y-auto', chosen !== null && 'max-md:hidden')}>
      <ul>
        {letters.map((letter) => (
          <li key={letter.id} className="border-b border-line last:border-0">
            <Link
              to={paths.mailbox(letter.id)}
              aria-current={letter.id === chosen ? 'page' : undefined}
              className="block border-l-3 border-transparent px-3 py-2.5 -outline-offset-2 hover:bg-paper aria-[current=page]:border-ember aria-[current=page]:bg-paper"
            >
              <span className="block font-semibold">{letter.subject}</span>
              <span className="block truncate text-xs text-muted">to {letter.to}</span>
              <time dateTime={letter.at} className="block text-xs text-muted">
                {localMoment(letter.at)}
              </time>
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
