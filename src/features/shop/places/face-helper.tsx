import { useState } from 'react';
import { Button } from '#src/ui/button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { flowFromFace } from './model/place-form.ts';

/** Offers an air flow where nobody has measured one. */
export function FaceHelper({ onUse }: { onUse: (cubicMetresPerHour: number) => void }) {
  const [width, setWidth] = useState('');
  const [height, setHeight] = useState('');
  const flow = flowFromFace(width, height);
  return (
    <details className="rounded border border-line px-3.5 py-2">
      <summary className="cursor-pointer font-semibold">Not measured? Reckon it from the face</summary>
      <div className="flex flex-col gap-3 pt-3">
        <div className="grid grid-cols-2 gap-3">
          <TextField
            label="Width of the face, m"
            inputMode="decimal"
            autoComplete="off"
            value={width}
            onChange={(event) => setWidth(event.target.value)}
          />
          <TextField
            label="Height of the face, m"
            inputMode="decimal"
            autoComplete="off"
            value={height}
            onChange={(event) => setHeight(event.target.value)}
          />
        </div>
        <p className="text-xs text-muted">
          The cross-section that the air crosses times 0.508 m/s, which is 100 ft/min (29 CFR 1910.107(b)(5)(i)). A
          stand-in until it is measured: loaded filters bring a booth below it.
        </p>
        <Button
          size="small"
          className="self-start"
          disabled={flow === null}
          onClick={() => {
            if (flow !== null) onUse(flow);
          }}
        >
          {flow === null ? 'Use it' : `Use ${flow.toLocaleString('en-GB')} m³/h`}
        </Button>
      </div>
    </details>
  );
}
