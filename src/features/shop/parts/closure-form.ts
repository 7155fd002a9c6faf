import type { Closure, ClosureFields, ClosureKind } from '#contracts/hours.ts';
import { formOf as recurrenceOf, newRecurrence, readRecurrence, type RecurrenceFaults } from './recurrence.ts';
import type { RecurrenceForm } from './recurrence.ts';

/** A closure as it is typed. `of`: empty for the whole shop, else `place ID` or `lamp ID`. */
export type ClosureForm = { kind: ClosureKind; label: string; of: string; when: RecurrenceForm };
/** What can be closed. */
export type Things = {
  places: readonly { id: string; name: string; retired: boolean }[];
  lamps: readonly { id: string; name: string; retired: boolean }[];
};

export const closureWords: Record<ClosureKind, string> = {
  holiday: 'Holiday',
  closure: 'Closure',
  maintenance: 'Maintenance',
  breakdown: 'Breakdown',
};

/** What one would most likely mean: a holiday is a day of the whole shop, upkeep comes again, a breakdown begins now. */
export function newClosure(kind: ClosureKind, now: { day: string; time: string }, of = ''): ClosureForm {
  const when = newRecurrence(now.day);
  switch (kind) {
    case 'holiday':
      return { kind, label: '', of, when: { ...when, allDay: true } };
    case 'closure':
      return { kind, label: '', of, when: { ...when, time: '12:00', end: '17:00', length: '5 h' } };
    case 'maintenance':
      return { kind, label: '', of, when: { ...when, repeat: 'weekly', every: '2', length: '2 h', end: '9:00' } };
    case 'breakdown':
      return { kind, label: '', of, when: { ...when, time: now.time, end: '18:00', length: '4 h' } };
    default:
      return kind satisfies never;
  }
}

export const closureForm = (closure: Closure, clock: '24' | '12'): ClosureForm => ({
  kind: closure.kind,
  label: closure.label,
  of: ofClosure(closure),
  when: recurrenceOf(closure, clock),
});

export const ofClosure = ({ placeId, lampId }: Pick<Closure, 'placeId' | 'lampId'>): string =>
  placeId !== null ? `place ${placeId}` : lampId !== null ? `lamp ${lampId}` : '';

export const nameOfThing = ({ places, lamps }: Things, closure: Pick<Closure, 'placeId' | 'lampId'>): string => {
  const id = closure.placeId ?? closure.lampId;
  return id === null ? 'Whole shop' : ([...places, ...lamps].find((one) => one.id === id)?.name ?? 'gone');
};

type ClosureRead = { value: ClosureFields; faults: null } | { value: null; faults: { when: RecurrenceFaults } };

export function readClosureForm({ kind, label, of, when }: ClosureForm, measure: 'length' | 'end'): ClosureRead {
  const read = readRecurrence(when, measure);
  if (read.value === null) return { value: null, faults: { when: read.faults } };
  const [what, id = null] = of.split(' ');
  return {
    value: {
      kind,
      label: label.trim(),
      placeId: what === 'place' ? id : null,
      lampId: what === 'lamp' ? id : null,
      ...read.value,
    },
    faults: null,
  };
}

export const isClosureForm = (value: unknown): value is ClosureForm =>
  typeof value === 'object' && value !== null && 'kind' in value && 'of' in value && 'when' in value;
