import type { ReactNode } from 'react';

export const Section = ({ title, children }: { title: string; children: ReactNode }) => (
  <section className="card flex flex-col gap-4 p-4 sm:p-5">
    <h2>{title}</h2>
    {children}
  </section>
);
