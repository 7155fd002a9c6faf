import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { isAlive } from '../../scripts/lib/children.mjs';
import { openCluster, type Cluster } from '../../scripts/lib/postgres.mjs';

const library = path.resolve('scripts/lib/postgres.mjs');
let folder: string;
const opened: Cluster[] = [];

// One folder for all, as each test leaves it with no server running: making a cluster takes longest.
beforeAll(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'ovenbird-house-'));
});

afterEach(async () => {
  await Promise.all(opened.splice(0).map((cluster) => cluster.stop()));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

async function open(durable = false): Promise<Cluster> {
  const cluster = await openCluster({ folder, durable });
  opened.push(cluster);
  return cluster;
}

async function ask(cluster: Cluster, sql: string): Promise<unknown> {
  const client = new pg.Client({ connectionString: cluster.url('ovenbird') });
  await client.connect();
  try {
    const { rows } = await client.query<Record<string, unknown>>(sql);
    return rows[0] && Object.values(rows[0])[0];
  } finally {
    await client.end();
  }
}

const pidFile = () => path.join(folder, 'pgdata/postmaster.pid');
const serverPid = () => parseInt(readFileSync(pidFile(), 'utf8'));

/** A start whose process is killed without a chance to clear up; says "open" once its server answers. */
async function killedStart(): Promise<void> {
  const script = `const { openCluster } = await import(${JSON.stringify(library)});
    await openCluster({ folder: ${JSON.stringify(folder)}, durable: false });
    console.log('open'); setInterval(() => {}, 1000);`;
  const child = spawn(process.execPath, ['--input-type=module', '-e', script], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  await once(child.stdout, 'data');
  child.kill('SIGKILL');
  await once(child, 'exit');
}

describe('the private PostgreSQL server', () => {
  test('keeps its data, its port and its password from one start to the next', async () => {
    const first = await open();
    await ask(first, 'create table first_kept as select 42 as n');
    await first.stop();
    const second = await open();
    expect(second.url('ovenbird')).toBe(first.url('ovenbird'));
    expect(await ask(second, 'select n from first_kept')).toBe(42);
    expect(statSync(path.join(folder, 'owner-password')).mode & 0o777).toBe(0o600);
    expect(await ask(second, 'show listen_addresses')).toBe('127.0.0.1');
  });

  test('refuses a wrong password', async () => {
    const cluster = await open();
    const url = new URL(cluster.url('ovenbird'));
    url.password = 'guess';
    await expect(new pg.Client({ connectionString: url.href }).connect()).rejects.toMatchObject({ code: '28P01' });
  });

  test('is refused to a second start while the first one runs', async () => {
    await open();
    await expect(openCluster({ folder, durable: false })).rejects.toThrow(/in use by a running start/);
  });

  test('comes back after its parent was killed', async () => {
    await killedStart();
    expect(await ask(await open(), 'select 1')).toBe(1);
  });

  test('replaces a server that outlived its parent', async () => {
    const orphan = await open();
    const before = serverPid();
    // No process has this number: Linux stops at 2^22.
    writeFileSync(path.join(folder, 'keeper'), '4194305 1\n');
    expect(await ask(await open(), 'select 1')).toBe(1);
    await orphan.ended;
    expect(serverPid()).not.toBe(before);
    expect(isAlive(before)).toBe(false);
  });

  test('comes back when the server itself was killed, and keeps what was committed', async () => {
    const cluster = await open(true);
    await ask(cluster, 'create table kept as select 7 as n');
    process.kill(serverPid(), 'SIGKILL');
    await cluster.ended;
    expect(await ask(await open(true), 'select n from kept')).toBe(7);
  });

  test('is not stopped by a pid file whose number now belongs to another program', async () => {
    const cluster = await open();
    await cluster.stop();
    // This very process: alive, and no PostgreSQL.
    writeFileSync(pidFile(), `${process.pid}\n${folder}/pgdata\n`);
    expect(await ask(await open(), 'select 1')).toBe(1);
  });

  test('starts on another port when its own is taken, and says so in its address', async () => {
    const first = await open();
    await first.stop();
    const squatter = createServer().listen(first.port, '127.0.0.1');
    await once(squatter, 'listening');
    const second = await open();
    squatter.close();
    expect(second.port).not.toBe(first.port);
    expect(await ask(second, 'select 1')).toBe(1);
  });
});
