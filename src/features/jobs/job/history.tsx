import type { Job } from '#contracts/jobs.ts';
import { useFormats } from '#src/lib/session.ts';
import { historyWords } from '../model/history-words.ts';
import { sayOf } from '../say.ts';
import { SideCard } from './side-card.tsx';

/** What happened, newest first, in words. */
export function History({ job }: { job: Job }) {
  const formats = useFormats();
  const lines = job.history.flatMap((line) => {
    const words = historyWords(line, sayOf(formats));
    return words ? [{ ...line, words }] : [];
  });
  return (
    <SideCard title="History">
      {lines.length === 0 && <p className="text-muted">Nothing yet.</p>}
      <ol className="flex max-h-96 flex-col gap-3 overflow-y-auto" tabIndex={0} aria-label="History">
        {lines.map(({ at, by, kind, words: [first, ...more] }, i) => (
          <li key={`${at} ${kind} ${i}`} className="flex flex-col">
            <span>{first}</span>
            {more.map((text) => (
              <span key={text} className="text-[0.8125rem] wrap-anywhere text-muted">
                {text}
              </span>
            ))}
            <span className="text-xs text-muted">
              <time dateTime={at}>{formats.dateTime(at)}</time>
              {by && ` · ${by}`}
            </span>
          </li>
        ))}
      </ol>
    </SideCard>
  );
}
