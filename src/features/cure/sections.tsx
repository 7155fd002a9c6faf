import { TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';

/** What is typed beside what comes of it; below it on a phone. */
export function Split({ asked, found }: { asked: ReactNode; found: ReactNode }) {
  return (
    <div className="grid grid-cols-1 items-start gap-4 lg:grid-cols-[22rem_minmax(0,1fr)]">
      <div className="flex min-w-0 flex-col gap-4">{asked}</div>
      <div className="flex min-w-0 flex-col gap-4">{found}</div>
    </div>
  );
}

export function Card({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title} className="card flex min-w-0 flex-col gap-3 p-4">
      <h2>{title}</h2>
      {children}
    </section>
  );
}

/** The one figure that was asked for. Read out when it settles. */
export function Headline({ figure, children }: { figure: ReactNode; children?: ReactNode }) {
  return (
    <div role="status" className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
      <strong className="figures text-2xl leading-8">{figure}</strong>
      {children && <span className="text-muted">{children}</span>}
    </div>
  );
}

/** Instead of an answer while a field is wrong. */
export const NotYet = ({ children }: { children?: ReactNode }) => (
  <p role="status" className="text-muted">
    {children ?? 'The answer is here as soon as every field makes sense.'}
  </p>
);

/** What to mind about an answer, in words. */
export function Warnings({ words }: { words: readonly string[] }) {
  if (words.length === 0) return null;
  return (
    <ul aria-label="Warnings" className="flex flex-col gap-1.5">
      {words.map((word) => (
        <li key={word} className="flex items-start gap-2 text-[0.8125rem]">
          <TriangleAlert size={15} className="mt-0.5 shrink-0 text-amber" aria-hidden="true" />
          <span className="min-w-0">{word}</span>
        </li>
      ))}
    </ul>
  );
}

/** A word from which the answer hangs: go or no go. */
export function Verdict({ good, children }: { good: boolean; children: ReactNode }) {
  const tone = good ? 'border-moss bg-moss-soft text-moss' : 'border-crimson bg-crimson-soft text-crimson';
  return (
    <p role="status" className={`rounded border px-3.5 py-2.5 text-base font-bold ${tone}`}>
      {children}
    </p>
  );
}

/** By which formula, and how far it can be trusted. */
export const Source = ({ children }: { children: ReactNode }) => (
  <p className="text-xs text-muted">
    <span className="font-semibold">Source: </span>
    {children}
  </p>
);

export function Facts({ rows }: { rows: readonly (readonly [name: string, value: ReactNode])[] }) {
  return (
    <dl className="grid grid-cols-1 gap-x-6 sm:grid-cols-2">
      {rows.map(([name, value]) => (
        <div key={name} className="flex items-baseline justify-between gap-3 border-b border-line py-1.5">
          <dt className="text-muted">{name}</dt>
          <dd className="figures text-right font-semibold">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
