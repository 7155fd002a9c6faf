import { CircleAlert, TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';
import type { Fault } from '../model/faults.ts';
import { placeId, useEditor } from './editor-context.ts';

type FaultPlaceProps = {
  stage: string | null;
  way?: string | null;
  field: string;
  /** Other fields whose faults are shown here too. */
  also?: readonly string[];
  className?: string;
  children: ReactNode;
};

/** A part of the form with the faults that are about it. */
export function FaultPlace({ stage, way = null, field, also = [], className, children }: FaultPlaceProps) {
  const { faults } = useEditor();
  const fields = [field, ...also];
  const here = faults.filter((fault) => fault.stage === stage && fault.way === way && fields.includes(fault.field));
  return (
    <div className={cx('flex min-w-0 flex-col gap-1.5', className)}>
      {fields.map((one) => (
        <span key={one} id={placeId(stage, way, one)} className="sr-only" />
      ))}
      {children}
      <FaultNotes faults={here} />
    </div>
  );
}

export function FaultNotes({ faults }: { faults: readonly Fault[] }) {
  if (faults.length === 0) return null;
  return (
    <ul className="flex flex-col gap-1 text-[0.8125rem]" data-faults>
      {faults.map((fault) => (
        <li key={fault.code + fault.text} className="flex items-start gap-1.5">
          <FaultIcon severity={fault.severity} />
          <span>
            <FaultWords fault={fault} />
          </span>
        </li>
      ))}
    </ul>
  );
}

export const FaultIcon = ({ severity }: Pick<Fault, 'severity'>) => {
  const Icon = severity === 'stop' ? CircleAlert : TriangleAlert;
  return (
    <Icon
      size={15}
      className={cx('mt-0.5 shrink-0', severity === 'stop' ? 'text-crimson' : 'text-amber')}
      role="img"
      aria-label={severity === 'stop' ? 'Stops saving' : 'Look at it'}
    />
  );
};

export const FaultWords = ({ fault: { text, when } }: { fault: Fault }) => (
  <>
    {text}
    {when && <span className="text-muted"> ({when})</span>}
  </>
);
