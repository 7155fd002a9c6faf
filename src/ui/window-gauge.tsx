import { cx } from '#src/lib/cx.ts';
import type { Formats } from '#src/lib/formats.ts';
import { windowTone, type WindowTone } from '#src/lib/window-tone.ts';
import { windowWords } from '#src/lib/window-words.ts';

type WindowGaugeProps = {
  window: { earliest: string | null; latest: string | null };
  /** Where the stage starts, or now where it has not been planned. */
  start: string;
  formats: Formats;
  /** Thick enough for the bay. */
  large?: boolean;
  className?: string;
};

const tones: Record<WindowTone, string> = { room: 'text-petrol', closing: 'text-amber', outside: 'text-crimson' };

/**
 * The window line: from the earliest to the latest start that the chemistry leaves, with a tick where the stage starts.
 * An end without a limit fades out. Nothing is drawn where there is no window at all.
 */
export function WindowGauge({ window, start, formats, large, className }: WindowGaugeProps) {
  const { earliest, latest } = window;
  if (earliest === null && latest === null) return null;
  const { from, to, tick } = placed(window, start);
  return (
    <span
      role="img"
      aria-label={windowWords(window, start, formats)}
      className={cx('relative block', large ? 'h-4' : 'h-2.5', tones[windowTone(window, start)], className)}
    >
      <i
        className={cx('absolute top-1/2 -translate-y-1/2 bg-current', large ? 'h-1' : 'h-0.5')}
        style={{ left: `${from}%`, width: `${to - from}%`, maskImage: fade(earliest === null, latest === null) }}
      />
      <i
        className={cx('absolute inset-y-0 -translate-x-1/2 bg-ink', large ? 'w-1' : 'w-0.5')}
        style={{ left: `${tick}%` }}
      />
    </span>
  );
}

const hour = 3_600_000;

/** Percent of the width for both ends of the window and the start; all of them are in sight. */
function placed({ earliest, latest }: WindowGaugeProps['window'], start: string) {
  const at = Date.parse(start);
  // An open end goes on for as long as the known side is, so that the start does not seem to be at the last minute.
  const beyond = Math.max(hour, at - Date.parse(earliest ?? start), Date.parse(latest ?? start) - at);
  const from = earliest === null ? at - beyond : Date.parse(earliest);
  const to = latest === null ? at + beyond : Date.parse(latest);
  const low = Math.min(from, to, at);
  const length = Math.max(from, to, at) - low || 1;
  const percent = (ms: number) => 2 + ((ms - low) / length) * 96;
  return {
    from: earliest === null ? 2 : percent(from),
    to: latest === null ? 98 : percent(to),
    tick: percent(at),
  };
}

function fade(left: boolean, right: boolean): string | undefined {
  if (!left && !right) return undefined;
  return `linear-gradient(90deg, ${left ? 'transparent' : '#000'}, #000 30% 70%, ${right ? 'transparent' : '#000'})`;
}
