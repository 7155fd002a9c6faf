type Timer = ReturnType<typeof setTimeout>;
type Told = {
  /** Open (again); `wasLost` where it had been reported lost, so that more may have been missed than is sent again. */
  onOpen: (wasLost: boolean) => void;
  /** Broken for longer than a moment. */
  onLost: () => void;
  on: Record<string, (data: string) => void>;
};

export type EventStream = {
  isOpen: () => boolean;
  /** Begins again, whatever state it is in. */
  open: () => void;
  /** Ends it. `missed`: what comes until it is opened again is missed. */
  close: (missed: boolean) => void;
};

/** A stream that breaks and is back within this time was never gone. */
const grace = 2_500;
const longestWait = 30_000;

/**
 * Server-sent events that come back by themselves: the browser tries again after a break; after an answer that is no
 * stream, which closes it for good, we do, each time later.
 */
export function keepEventStream(address: string, { on, onOpen, onLost }: Told): EventStream {
  let source: EventSource | null = null;
  let lostTimer: Timer | undefined;
  let againTimer: Timer | undefined;
  let wasLost = false;
  let tries = 0;

  const close = (missed: boolean) => {
    source?.close();
    source = null;
    clearTimeout(lostTimer);
    clearTimeout(againTimer);
    lostTimer = undefined;
    wasLost ||= missed;
  };
  const opened = () => {
    clearTimeout(lostTimer);
    lostTimer = undefined;
    tries = 0;
    onOpen(wasLost);
    wasLost = false;
  };
  const broken = () => {
    lostTimer ??= setTimeout(() => {
      wasLost = true;
      onLost();
    }, grace);
    if (source?.readyState !== EventSource.CLOSED) return;
    clearTimeout(againTimer);
    againTimer = setTimeout(open, Math.min(longestWait, 2_000 * 2 ** tries++));
  };
  function open(): void {
    source?.close();
    source = new EventSource(address);
    source.addEventListener('open', opened);
    source.addEventListener('error', broken);
    for (const [name, tell] of Object.entries(on))
      source.addEventListener(name, (event: MessageEvent<string>) => tell(event.data));
  }
  open();
  return { open, close, isOpen: () => source !== null && source.readyState !== EventSource.CLOSED };
}
