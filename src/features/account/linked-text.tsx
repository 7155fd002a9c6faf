import type { ReactNode } from 'react';

const address = /(https?:\/\/[^\s<>"]+[^\s<>".,;:!?)\]])/;

/** Plain text in which addresses can be pressed. An address of this very server opens here. */
export const linked = (text: string): ReactNode[] =>
  text.split(address).map((piece, i) => {
    // Odd pieces are what the expression captured.
    if (i % 2 === 0) return piece;
    return (
      <a key={i} href={piece} className="link wrap-anywhere" rel="noreferrer">
        {piece}
      </a>
    );
  });
