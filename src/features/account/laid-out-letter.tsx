import type { SyntheticEvent } from 'react';

/**
 * A letter as a mail program would show it, in a frame where no script runs. The pages' security policy holds in there
 * too and refuses styles that stand in the text; so they are carried past the parser and set on each element afterwards.
 */
export function LaidOut({ title, html }: { title: string; html: string }) {
  const inert = html
    .replaceAll(/<(style|script)\b[\s\S]*?<\/\1>/gi, '')
    .replaceAll(/(<[^<>]*?\s)style=/gi, '$1data-style=');
  return (
    <iframe
      title={title}
      srcDoc={inert}
      sandbox="allow-same-origin allow-popups allow-popups-to-escape-sandbox"
      className="block h-[60dvh] w-full bg-[#ffffff]"
      onLoad={dress}
    />
  );
}

function dress(event: SyntheticEvent<HTMLIFrameElement>): void {
  const frame = event.currentTarget;
  const letter = frame.contentDocument;
  if (!letter) return;
  for (const element of letter.querySelectorAll<HTMLElement>('[data-style]'))
    element.style.cssText = element.dataset['style'] ?? '';
  for (const link of letter.querySelectorAll('a')) {
    link.target = '_blank';
    link.rel = 'noreferrer';
  }
  frame.style.height = `${letter.documentElement.scrollHeight + 4}px`;
}
