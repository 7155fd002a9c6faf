import { Search } from 'lucide-react';
import { useEffect, useRef, useState, type RefObject } from 'react';
import { cx } from '#src/lib/cx.ts';
import { boxClasses } from '#src/ui/box-classes.ts';

type SearchBoxProps = { value: string; onChange: (text: string) => void };

const pause = 250;

/** Asks a moment after the last key. `/` from anywhere on the page leads here, Esc clears it. */
export function SearchBox({ value, onChange }: SearchBoxProps) {
  const box = useRef<HTMLInputElement>(null);
  const [text, setText] = useState(value);
  const [heard, setHeard] = useState(value);
  // The address has changed by itself (a link, the back button), not by what was typed here.
  if (value !== heard) {
    setHeard(value);
    if (value !== text.trim()) setText(value);
  }
  useSlash(box);
  useEffect(() => {
    const wanted = text.trim();
    if (wanted === value) return;
    const timer = setTimeout(() => onChange(wanted), pause);
    return () => clearTimeout(timer);
  }, [text, value, onChange]);
  return (
    <label className="relative block min-w-0 grow basis-44 sm:w-80">
      <span className="sr-only">Search jobs by number, title or vehicle</span>
      <Search
        size={16}
        aria-hidden="true"
        className="pointer-events-none absolute inset-y-0 left-3 my-auto text-muted"
      />
      <input
        ref={box}
        type="search"
        className={cx(boxClasses, 'pl-9')}
        placeholder="Number, title or vehicle"
        aria-keyshortcuts="/"
        maxLength={100}
        autoComplete="off"
        value={text}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Escape') setText('');
        }}
      />
    </label>
  );
}

function useSlash(box: RefObject<HTMLInputElement | null>): void {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.key !== '/' || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      event.preventDefault();
      box.current?.focus();
      box.current?.select();
    };
    addEventListener('keydown', onKey);
    return () => removeEventListener('keydown', onKey);
  }, [box]);
}

const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName));
