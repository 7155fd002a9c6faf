import type { Formats } from '#src/lib/formats.ts';
import type { Say } from './model/field-words.ts';

export const sayOf = (formats: Formats): Say => ({
  moment: formats.dateTime,
  temperature: (celsius) => formats.temperature(celsius, 'limit'),
});
