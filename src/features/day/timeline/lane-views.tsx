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
  const isDay = axis.days.length > 1 && level === 0;
  return <span className={isDay ? 'slot-day' : 'slot-hour'}>{isDay ? sayDay(at) : sayTime(at)}</span>;
}
