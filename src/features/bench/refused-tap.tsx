import { useId, useState } from 'react';
import { isApiError } from '#src/lib/api-error.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextArea } from '#src/ui/text-field.tsx';
import type { Refused } from './model/tap-queue.ts';

type RefusedTapProps = { refused: Refused; onOverrule: (reason: string) => void; onSeen: () => void };

/** A tap that was not taken, and why. Who leads may have spraying started under the dew-point gate, and says why. */
export function RefusedTap({ refused: { tap, error }, onOverrule, onSeen }: RefusedTapProps) {
  const { role } = useShop();
  const isGate = isApiError(error, 'refused') && error.reasons.some(({ code }) => code === 'dew-point');
  return (
    <ErrorNote error={error} what={`${tap.deed === 'start' ? 'Start' : 'Done'} of ${tap.words} was not taken.`}>
      {isGate && may.plan(role) && <Overrule onOverrule={onOverrule} />}
      {isGate && !may.plan(role) && (
        <p className="text-base">A lead can have it started all the same, with a reason.</p>
      )}
      <button type="button" className="link self-start py-2" onClick={onSeen}>
        I have seen it
      </button>
    </ErrorNote>
  );
}

function Overrule({ onOverrule }: { onOverrule: (reason: string) => void }) {
  const id = useId();
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const fault = reason.trim().length < 3 ? 'Say why, for whoever reads it later.' : '';
  return (
    <form
      noValidate
      className="mt-1 flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (fault === '') onOverrule(reason.trim());
      }}
    >
      <TextArea
        key={id}
        label="Why it is sprayed all the same"
        hint="Kept with the stage and in the history."
        rows={2}
        maxLength={400}
        error={tried ? fault : ''}
        value={reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <Button type="submit" size="bay" className="self-start">
        Start all the same
      </Button>
    </form>
  );
}
