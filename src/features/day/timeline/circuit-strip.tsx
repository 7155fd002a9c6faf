import { memo } from 'react';
import type { Axis } from '../model/axis.ts';
import { loadPath, loadSteps, peakOf, stripTop } from '../model/circuit-load.ts';
import type { DayView } from '#contracts/day.ts';

type Props = { view: DayView; circuit: DayView['circuits'][number]; axis: Axis };

/** A circuit's load in kilowatts against its limit, in the lane of its row and so on the same time axis. */
export const CircuitStrip = memo(function CircuitStrip({ view, circuit, axis }: Props) {
  const steps = loadSteps(view, circuit.id);
  const { kilowatts, over } = peakOf(steps, circuit.kilowatts);
  const top = stripTop(steps, circuit.kilowatts);
  const limit = 100 - (circuit.kilowatts / top) * 100;
  const said = `${circuit.name}: at most ${kilowatts} kW of ${circuit.kilowatts} kW${over ? ', more than it carries' : ''}`;
  return (
    <div className={over ? 'strip strip-over' : 'strip'} role="img" aria-label={said} title={said}>
      <svg viewBox="0 0 1000 100" preserveAspectRatio="none" aria-hidden="true">
        <path d={loadPath(steps, axis, top)} className="strip-load" />
        <line x1="0" x2="1000" y1={limit} y2={limit} className="strip-limit" />
      </svg>
      {kilowatts > 0 && (
        <span className="strip-peak" aria-hidden="true">
          peak {kilowatts} kW{over ? ', over the limit' : ''}
        </span>
      )}
    </div>
  );
});
