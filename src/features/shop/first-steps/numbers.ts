/** A number as typed, with a point or a comma; NaN where it is none, which the schema then refuses. */
export const numberOf = (text: string): number =>
  /^\s*\d+([.,]\d+)?\s*$/.test(text) ? Number(text.trim().replace(',', '.')) : NaN;

/** `07:00` of a time typed loosely in minutes since midnight; as it stands where it is none. */
export const clockText = (minutes: number | null, typed: string): string =>
  minutes === null
    ? typed
    : `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;

export const sayFault = (fault: string | undefined): string | undefined =>
  fault === undefined ? undefined : `${fault.charAt(0).toUpperCase()}${fault.slice(1).replace(/\.$/, '')}.`;
