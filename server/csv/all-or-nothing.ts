import type { Knex } from 'knex';
import type { CsvFault, CsvReport } from '#contracts/csv.ts';
import { inShop, type Scope, type Trx } from '../db/in-shop.ts';

/** What taking a file's rows came to. Faults may still be found while writing, such as a name that is taken. */
export type Taken = { added: number; changed: number; faults: CsvFault[] };

/**
 * Takes a file whole or not at all: `work` writes, and with `tryOnly` or any fault all of it is undone. The report of a
 * try is what taking the file would say, for it has been taken.
 */
export async function allOrNothing(
  db: Knex,
  scope: Scope,
  { lines, tryOnly }: { lines: number; tryOnly: boolean },
  work: (trx: Trx) => Promise<Taken>,
): Promise<CsvReport> {
  try {
    return await inShop(db, scope, async (trx) => {
      const { added, changed, ...found } = await work(trx);
      const faults = found.faults.toSorted((a, b) => a.line - b.line);
      const isClean = faults.length === 0;
      const report = { lines, added: isClean ? added : 0, changed: isClean ? changed : 0, faults };
      if (tryOnly || !isClean) throw new Undone(report);
      return report;
    });
  } catch (error) {
    if (error instanceof Undone) return error.report;
    throw error;
  }
}

class Undone extends Error {
  readonly report: CsvReport;
  constructor(report: CsvReport) {
    super('undone on purpose');
    this.report = report;
  }
}
