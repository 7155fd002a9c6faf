import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import type { ReplyOf } from '#contracts/endpoint.ts';
import { listLetters } from '#contracts/mailbox.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge, type Tone } from '#src/ui/badge.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { NotYours } from './not-yours.tsx';

type Letter = ReplyOf<typeof listLetters>['letters'][number];
type State = Letter['state'];

const states: Record<State, { word: string; tone: Tone }> = {
  queued: { word: 'waits', tone: 'petrol' },
  sent: { word: 'sent', tone: 'moss' },
  dropped: { word: 'no longer needed', tone: 'plain' },
  dead: { word: 'could not be delivered', tone: 'crimson' },
};
const kinds: Record<string, string> = {
  invitation: 'Invitation',
  test: 'Test letter',
  'plan-changed': 'Plan has changed',
  'training-ends': 'Spray training ends',
  reset: 'New password',
};
const filters = [
  { value: 'all', label: 'All' },
  { value: 'queued', label: 'Waiting' },
  { value: 'sent', label: 'Sent' },
  { value: 'dead', label: 'Not delivered' },
] as const;

export function Component() {
  return may.setUp(useShop().role) ? <Letters /> : <NotYours title="Letters sent" />;
}

/** The outbox: what waits, what was sent, and what nobody got. */
function Letters() {
  const shop = useShop();
  const [search, setSearch] = useSearchParams();
  const filter = filters.find(({ value }) => value === search.get('state'))?.value ?? 'all';
  const letters = useQuery({
    queryKey: shopKey(shop.id, 'letters', filter),
    queryFn: ({ signal }) =>
      call(listLetters, {
        params: { shopId: shop.id },
        query: filter === 'all' ? {} : { state: filter },
        signal,
      }),
    placeholderData: keepPreviousData,
  });
  return (
    <Page title="Letters sent" about={shop.name}>
      <Choice
        label="Show"
        hideLabel
        options={filters}
        value={filter}
        onChange={(next) => setSearch(next === 'all' ? {} : { state: next }, { replace: true })}
      />
      {letters.isPending && <SkeletonLines lines={6} label="Loading the letters" />}
      {letters.isError && (
        <ErrorNote error={letters.error} what="The letters could not be loaded." retry={() => void letters.refetch()} />
      )}
      {letters.data &&
        (letters.data.letters.length === 0 ? (
          <EmptyState title="No letters here">
            <p>Invitations and news of a changed plan are listed here, with what became of them.</p>
          </EmptyState>
        ) : (
          <LetterTable letters={letters.data.letters} />
        ))}
    </Page>
  );
}

function LetterTable({ letters }: { letters: Letter[] }) {
  const { dateTime } = useFormats();
  return (
    <Table label="Letters" className="max-h-[75dvh]">
      <thead>
        <tr>
          <Th>Letter</Th>
          <Th>To</Th>
          <Th>State</Th>
          <Th>Written</Th>
          <Th>Sent</Th>
        </tr>
      </thead>
      <tbody>
        {letters.map((letter) => (
          <tr key={letter.id}>
            <Td className="font-semibold whitespace-nowrap">{kinds[letter.kind] ?? letter.kind}</Td>
            <Td className="min-w-40 wrap-anywhere">{letter.to}</Td>
            <Td>
              <Badge tone={states[letter.state].tone}>{states[letter.state].word}</Badge>
              {letter.lastError && <p className="mt-1 max-w-prose text-xs text-muted">{letter.lastError}</p>}
            </Td>
            <Td className="whitespace-nowrap">{dateTime(letter.createdAt)}</Td>
            <Td className="whitespace-nowrap">{letter.sentAt ? dateTime(letter.sentAt) : ''}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
