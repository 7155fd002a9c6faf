import type { ReactNode } from 'react';
import { useTitle } from '#src/lib/use-title.ts';

/** One screen at the front door: heading, a word on what it is for, a form or an outcome. */
export function DoorCard({ title, about, children }: { title: string; about?: ReactNode; children: ReactNode }) {
  useTitle(title);
  return (
    <div className="flex flex-col gap-4">
      <div>
        <h1>{title}</h1>
        {about && <div className="mt-1 text-muted">{about}</div>}
      </div>
      {children}
    </div>
  );
}
