import { CircleAlert } from 'lucide-react';
import { use, type ReactNode } from 'react';
import { ApiError } from '#src/lib/api-error.ts';
import { cx } from '#src/lib/cx.ts';
import { errorText } from '#src/lib/error-texts.ts';
import { reasonText, ruleText } from '#src/lib/reason-texts.ts';
import { ShopContext } from '#src/lib/session.ts';
import { Button } from './button.tsx';

type ErrorNoteProps = {
  error: unknown;
  /** What did not work: "The jobs could not be loaded." Before what the error itself says. */
  what?: string;
  /** What is safe in spite of it. */
  kept?: string;
  retry?: () => void;
  /** What a reason speaks of by "it", where that is not what the note is about. */
  subjectOf?: (reason: ApiError['reasons'][number]) => string | null;
  children?: ReactNode;
  className?: string;
};

/** What happened, what was kept, what to do next. Read out at once. */
export function ErrorNote({ error, what, kept, retry, subjectOf, children, className }: ErrorNoteProps) {
  const text = errorText(error);
  const { reasons, fields, requestId } =
    error instanceof ApiError ? error : { reasons: [], fields: [], requestId: null };
  const formats = use(ShopContext)?.formats;
  return (
    <div
      role="alert"
      className={cx('flex items-start gap-2.5 rounded border border-crimson bg-crimson-soft px-3.5 py-3', className)}
    >
      <CircleAlert size={18} className="mt-0.5 shrink-0 text-crimson" aria-hidden="true" />
      <div className="flex min-w-0 grow flex-col gap-1.5">
        <p className="font-semibold">
          {what && `${what} `}
          {text.what}
        </p>
        {reasons.length > 0 && (
          <ul className="flex list-disc flex-col gap-1 pl-4.5">
            {reasons.map((reason, i) => (
              <li key={i}>
                <Subject name={subjectOf?.(reason) ?? null} />
                {formats ? reasonText(reason, formats) : reason.code}
                {reason.rule !== null && <span className="text-xs text-muted"> ({ruleText(reason.rule)})</span>}
              </li>
            ))}
          </ul>
        )}
        {fields.length > 0 && (
          <ul className="flex list-disc flex-col gap-1 pl-4.5">
            {fields.map((field) => (
              <li key={field.path + field.message}>
                {field.path.replace(/^(body|query)\.?/, '') || 'input'}: {field.message}
              </li>
            ))}
          </ul>
        )}
        {(kept ?? text.next) && (
          <p className="text-muted">
            {kept && `${kept} `}
            {text.next}
          </p>
        )}
        {children}
        {retry && (
          <Button size="small" className="self-start" onClick={retry}>
            Try again
          </Button>
        )}
        {requestId && error instanceof ApiError && error.code === 'internal' && (
          <p className="text-xs text-muted">Number for those who look into it: {requestId}</p>
        )}
      </div>
    </div>
  );
}

const Subject = ({ name }: { name: string | null }) => (name === null ? null : <b>{name}: </b>);
