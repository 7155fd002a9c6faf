import { useBoardContext, useBoardData } from './board-context.ts';
import { CircuitStrip } from './circuit-strip.tsx';

export function CircuitLane({ id }: { id: string }) {
  const { view, axis } = useBoardData();
  const circuit = view.circuits.find((c) => c.id === id);
  return circuit ? <CircuitStrip view={view} circuit={circuit} axis={axis} /> : null;
}

/** Hours; above them, where several days are shown, the day. */
export function SlotLabel({ at, level }: { at: number; level: number }) {
  const { axis } = useBoardData();
  const { sayTime, sayDay } = useBoardContext();
  const isOne = axis.days.length === 1;
  if (!isOne && level === 0) return <span className="slot-day">{sayDay(at)}</span>;
  return <span className={isOne ? 'slot-hour' : 'slot-hour slot-hour-tight'}>{sayTime(at)}</span>;
}
