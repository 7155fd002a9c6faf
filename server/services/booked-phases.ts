import type { Way } from '#contracts/sheets.ts';

const MINUTE = 60_000;

export type BookedPhase = {
  kind: Way['phases'][number]['kind'];
  from: Date;
  to: Date;
  attendance: Way['phases'][number]['attendance'];
  lamp: boolean;
};

/** The way a stage was booked with. @throws where the stage has no such way: bookings are checked when they are made. */
export function wayOf(ways: readonly Way[], id: string): Way {
  const way = ways.find((candidate) => candidate.id === id);
  if (!way) throw new Error(`A booking names the way ${id}, which its stage does not have.`);
  return way;
}

/** Phases of a booking as instants: it keeps minutes from its start, the way knows what each of them is. */
export function bookedPhases(from: Date, minutes: readonly [number, number][], way: Way): BookedPhase[] {
  return way.phases.map((phase, i) => {
    const [start, end] = minutes[i] ?? [0, 0];
    return {
      kind: phase.kind,
      from: new Date(from.getTime() + start * MINUTE),
      to: new Date(from.getTime() + end * MINUTE),
      attendance: phase.attendance,
      lamp: phase.lamp ?? false,
    };
  });
}
