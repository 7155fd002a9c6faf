// Must be refused: requests are answered by services, never by a query of their own.
import knex from 'knex';
import { jobs } from '#server/db/jobs.ts';

export const seen = [knex, jobs];
