import * as z from 'zod';
import { endpoint } from './endpoint.ts';

/** 200 while the process runs and reaches the database, else 503. */
export const readHealth = endpoint({
  name: 'read-health',
  method: 'GET',
  path: '/api/health',
  reply: z.strictObject({ status: z.literal('ok') }),
});
/** 200 while it takes requests and hears of changes; 503 while it starts, stops or has lost the database. */
export const readReady = endpoint({
  name: 'read-ready',
  method: 'GET',
  path: '/api/ready',
  reply: z.strictObject({ status: z.literal('ready') }),
});
