import * as z from 'zod';

export const id = z.uuid();
/** ISO 8601 with an offset or Z; the server always answers in UTC. */
export const instant = z.iso.datetime({ offset: true });
/** A day of the shop's calendar. */
export const localDay = z.iso.date();
export const span = z.strictObject({ from: instant, to: instant });
export type Span = z.output<typeof span>;

export const inShop = z.strictObject({ shopId: id });

export const role = z.enum(['owner', 'lead', 'painter', 'office']);
export type Role = z.output<typeof role>;

export const placeKind = z.enum(['booth', 'prep', 'rack']);
export const phaseKind = z.enum(['setup', 'work', 'spray', 'flash', 'purge', 'bake', 'cool']);
export type PhaseKind = z.output<typeof phaseKind>;
export const attendance = z.enum(['hands', 'onsite', 'none']);
export const substrate = z.enum(['steel', 'aluminium', 'pp-tpo', 'abs', 'composite']);
export type Substrate = z.output<typeof substrate>;

export const name = z.string().trim().min(1).max(120);
export const note = z.string().trim().max(4000);
