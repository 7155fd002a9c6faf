import * as z from 'zod';
import { clash as bookedClash } from './people.ts';
import { reason } from './reasons.ts';

/** Posted work that a change of the set-up no longer allows, and why. It stands until somebody plans again. */
export const clash = bookedClash.extend({ reason });
export type Clash = z.output<typeof clash>;
export const clashes = z.array(clash);
