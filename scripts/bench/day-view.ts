import autocannon from 'autocannon';
import express from 'express';
import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import pg from 'pg';
import { pino } from 'pino';
import { createApp } from '#server/app.ts';
import { readConfig } from '#server/config.ts';
import { connect } from '#server/db/connect.ts';
import { diskStorage } from '#server/storage/disk.ts';
import type { Deps } from '#server/deps.ts';

type Sample = { requestsPerSecond: number; p50: number; p99: number };
export type DayViewFigures = { pairs: { day: Sample; floor: Sample }[] };

const SECONDS = 4;
const CONNECTIONS = 10;

/** The day view and a bare Express with a prepared `select 1`, in turn in one run: only their ratio means anything. */
export async function measureDayView(
  databaseUrl: string,
  signIn: { email: string; password: string },
  pairs: number,
): Promise<DayViewFigures> {
  const deps: Deps = {
    config: readConfig({ DATABASE_URL: databaseUrl, SESSION_SECRET: randomBytes(32).toString('hex') }),
    db: connect(databaseUrl, 10),
    log: pino({ level: 'silent' }),
    now: () => new Date(),
    storage: diskStorage('.data/files'),
  };
  const program = createApp(deps);
  const pool = new pg.Pool({ connectionString: databaseUrl, max: 10 });
  const bare = express().get('/', async (_req, res) => {
    res.json((await pool.query({ name: 'one', text: 'select 1 as one' })).rows[0]);
  });
  const servers = [await listen(program.app), await listen(bare)];
  try {
    const day = await dayRequest(addressOf(servers[0]!), deps, signIn);
    const floor = { url: `${addressOf(servers[1]!)}/`, headers: {} };
    await load(day);
    await load(floor);
    const figures: DayViewFigures = { pairs: [] };
    for (let i = 0; i < pairs; i++) figures.pairs.push({ day: await load(day), floor: await load(floor) });
    return figures;
  } finally {
    for (const server of servers) server.close();
    await program.close();
    await pool.end();
    await deps.db.destroy();
  }
}

async function listen(listener: RequestListener): Promise<Server> {
  const server = createServer(listener).listen(0, '127.0.0.1');
  await once(server, 'listening');
  return server;
}

const addressOf = (server: Server): string => `http://127.0.0.1:${(server.address() as AddressInfo).port}`;

async function dayRequest(address: string, deps: Deps, signIn: { email: string; password: string }) {
  const answer = await fetch(`${address}/api/session`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: deps.config.PUBLIC_URL, 'sec-fetch-site': 'same-origin' },
    body: JSON.stringify(signIn),
  });
  if (!answer.ok) throw new Error(`signing in for the measurement: ${answer.status} ${await answer.text()}`);
  const cookie = answer.headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .join('; ');
  const me = (await answer.json()) as { shops: { id: string }[] };
  const from = new Date();
  from.setUTCHours(0, 0, 0, 0);
  const to = new Date(from.getTime() + 86_400_000);
  const query = new URLSearchParams({ from: from.toISOString(), to: to.toISOString() });
  return { url: `${address}/api/shops/${me.shops[0]!.id}/day?${query.toString()}`, headers: { cookie } };
}

async function load(request: { url: string; headers: Record<string, string> }): Promise<Sample> {
  const result = await autocannon({ ...request, connections: CONNECTIONS, duration: SECONDS, workers: 1 });
  if (result.non2xx > 0 || result.errors > 0)
    throw new Error(`${request.url}: ${result.non2xx} answers were not 2xx, ${result.errors} requests failed`);
  return { requestsPerSecond: result.requests.average, p50: result.latency.p50, p99: result.latency.p99 };
}
