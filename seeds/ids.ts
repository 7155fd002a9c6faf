import { v5 } from 'uuid';

const NAMESPACE = 'b6f0a0c4-3b1d-4a52-9d57-6a3f5f1f2c11';

/** The same name gives the same id, today and on any machine, so that notes and addresses of the demo stay good. */
export const demoId = (kind: string, name: string): string => v5(`${kind}/${name}`, NAMESPACE);

/** A number from 0 to `below` - 1 that depends on nothing but the text: variety without chance. */
export const spread = (text: string, below: number): number =>
  Number.parseInt(v5(text, NAMESPACE).slice(0, 8), 16) % below;
