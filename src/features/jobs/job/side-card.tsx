import { useId, type ReactNode } from 'react';

type SideCardProps = { title: string; action?: ReactNode; children: ReactNode };

export function SideCard({ title, action, children }: SideCardProps) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="card flex flex-col gap-2 p-4">
      <div className="flex min-h-7 items-center justify-between gap-2">
        <h2 id={id}>{title}</h2>
        {action}
      </div>
      {children}
    </section>
  );
}
