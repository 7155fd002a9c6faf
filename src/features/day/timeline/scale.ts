import type { Axis } from '../model/axis.ts';

/** Zoom steps: 1 fits the width of the page. */
export const zooms = [1, 1.5, 2, 3, 4] as const;
export type Zoom = (typeof zooms)[number];

export const zoomed = (zoom: Zoom, by: 1 | -1): Zoom => zooms[zooms.indexOf(zoom) + by] ?? zoom;

/** Width of a slot that fits the given width times the zoom, and what a slot stands for. */
export function scaleOf(axis: Axis, width: number, zoom: Zoom): { slotMinutes: number; slotWidth: number } {
  const slotMinutes = slotMinutesOf(axis, (width * zoom) / axis.days.length);
  const slots = (axis.days.length * (axis.toMinute - axis.fromMinute)) / slotMinutes;
  // Rounded down: a pixel too much would bring a scrollbar.
  return { slotMinutes, slotWidth: Math.max(1, Math.floor((width * zoom) / slots)) };
}

/** The least of the round lengths that divides the shown hours and leaves its label room, 32 pixels. */
function slotMinutesOf(axis: Axis, dayWidth: number): number {
  const shown = axis.toMinute - axis.fromMinute;
  const choices = [30, 60, 120, 180, 240, 360, 720].filter((minutes) => shown % minutes === 0);
  return choices.find((minutes) => (dayWidth * minutes) / shown >= 32) ?? choices.at(-1) ?? 60;
}

/** `07:30:00`, as the timeline wants its clock times; a day may end at `24:00:00`. */
export const clockOf = (minute: number): string =>
  `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}:00`;
