import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';

type StepFormProps = {
  children: ReactNode;
  /** What the button says; "Take these" where the fields are filled already. */
  deed?: string;
  busy: boolean;
  error: Error | null;
  /** The full editors, for who would rather have all of it. */
  editors: { to: string; label: string }[];
  onSend: () => void;
};

/** One step: few fields, all of them filled, and one button. */
export function StepForm({ children, deed = 'Take these', busy, error, editors, onSend }: StepFormProps) {
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        onSend();
      }}
    >
      {children}
      {error && <ErrorNote error={error} what="Nothing was set up." kept="What you entered is kept." />}
      <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
        <Button type="submit" look="primary" busy={busy} className="max-sm:grow">
          {deed}
        </Button>
        {editors.map(({ to, label }) => (
          <Link key={to} to={to} className="link">
            {label}
          </Link>
        ))}
      </div>
    </form>
  );
}
