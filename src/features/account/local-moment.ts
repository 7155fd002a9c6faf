import { formatDay, formatTime } from '#src/lib/formats.ts';
import { localDayOf } from '#src/lib/wall-clock.ts';

/** A moment on this machine's clock: the mailbox belongs to the machine and to no shop. */
export function localMoment(at: string): string {
  const zone = Intl.DateTimeFormat().resolvedOptions().timeZone;
  return `${formatDay(localDayOf(Date.parse(at), zone))} ${formatTime(at, { zone, clock: '24' })}`;
}
