import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { readMailboxLetter } from '#contracts/mailbox.ts';
import { paths } from '#src/app/paths.ts';
import { call } from '#src/lib/api.ts';
import { Choice } from '#src/ui/choice.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { localMoment } from './local-moment.ts';
import { LaidOut } from './laid-out-letter.tsx';
import { linked } from './linked-text.tsx';

const shapes = [
  { value: 'text', label: 'Text' },
  { value: 'html', label: 'As laid out' },
] as const;

export function MailboxLetter({ letterId }: { letterId: string }) {
  const [shape, setShape] = useState<'text' | 'html'>('text');
  const letter = useQuery({
    queryKey: ['mailbox', letterId],
    queryFn: ({ signal }) => call(readMailboxLetter, { params: { letterId }, signal }),
    staleTime: Infinity,
  });
  if (letter.isPending) return <SkeletonLines lines={8} label="Loading the letter" />;
  if (letter.isError) return <ErrorNote error={letter.error} retry={() => void letter.refetch()} />;
  const { subject, from, to, at, text, html } = letter.data;
  return (
    <article className="card min-w-0">
      <header className="flex flex-col gap-1 border-b border-line p-4">
        <Link to={paths.mailbox()} className="link self-start md:hidden">
          All letters
        </Link>
        <h2>{subject}</h2>
        <p className="text-xs wrap-anywhere text-muted">
          from {from} to {to}, {localMoment(at)}
        </p>
        {html !== '' && (
          <Choice label="Show as" hideLabel className="mt-2" options={shapes} value={shape} onChange={setShape} />
        )}
      </header>
      {shape === 'text' || html === '' ? (
        <div className="max-w-prose p-4 text-[0.9375rem] leading-relaxed break-words whitespace-pre-wrap">
          {linked(text)}
        </div>
      ) : (
        <LaidOut title={subject} html={html} />
      )}
    </article>
  );
}
