// Must be refused by lint and by the compiler: the planner is pure.
import { readFileSync } from 'node:fs';
import { migrateLatest } from '#server/db/migrate.ts';

export const seen = [readFileSync, migrateLatest, process.env, document];
