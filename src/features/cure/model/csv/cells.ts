export type Delimiter = '\t' | ';' | ',';

/** Cells of one line. Quotes hold a delimiter; two of them stand for one. A quoted cell ends with its line. */
export function cellsOf(line: string, delimiter: Delimiter): string[] {
  if (!line.includes('"')) return line.split(delimiter).map((cell) => cell.trim());
  const cells: string[] = [];
  let [cell, quoted] = ['', false];
  for (let i = 0; i < line.length; i += 1) {
    const sign = line[i] ?? '';
    if (sign === '"' && quoted && line[i + 1] === '"') {
      cell += '"';
      i += 1;
    } else if (sign === '"') quoted = !quoted;
    else if (sign === delimiter && !quoted) {
      cells.push(cell.trim());
      cell = '';
    } else cell += sign;
  }
  return [...cells, cell.trim()];
}

/**
 * Tab before semicolon before comma, by the sign that parts most of the first lines: a comma may be a decimal sign wherever one
 * of the others is there as well.
 */
export function guessDelimiter(lines: readonly string[]): Delimiter {
  const full = lines.filter((line) => line.trim() !== '');
  for (const sign of ['\t', ';'] as const)
    if (full.filter((line) => line.includes(sign)).length * 2 > full.length) return sign;
  return ',';
}

/** A reading: decimal point or comma, a unit behind it allowed. NaN for anything else. */
export function reading(cell: string): number {
  const plain = cell.replace(/\s*°?\s*[CF]$/i, '').replace(',', '.');
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) ? Number(plain) : NaN;
}
