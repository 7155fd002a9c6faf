import type { ChosenTrace } from './trace.ts';

/** The readings that were judged, as lines `minutes,celsius`, gzip, base64: what is kept with a job's stage. */
export type PackedTrace = { rows: string; count: number; hottestCelsius: number | null };

export async function packTrace({ trace, hottestCelsius }: ChosenTrace): Promise<PackedTrace> {
  const lines = trace.map(({ minutes, metalCelsius }) => `${round(minutes, 4)},${round(metalCelsius, 2)}`);
  const stream = new Blob([lines.join('\n')]).stream().pipeThrough(new CompressionStream('gzip'));
  const bytes = new Uint8Array(await new Response(stream).arrayBuffer());
  return { rows: base64(bytes), count: trace.length, hottestCelsius };
}

const round = (value: number, digits: number): number => Number(value.toFixed(digits));

/** In pieces, since a call takes only so many arguments. */
function base64(bytes: Uint8Array): string {
  let text = '';
  for (let at = 0; at < bytes.length; at += 8192) text += String.fromCharCode(...bytes.subarray(at, at + 8192));
  return btoa(text);
}
