import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { mkdir, rename, writeFile } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import path from 'node:path';
import { simpleParser, type AddressObject } from 'mailparser';
import { SMTPServer } from 'smtp-server';

const largest = 10_485_760;

/** A mail server for one machine: takes letters on the loopback only, keeps each as a file and sends none on. */
export async function startLocalMail(given: {
  folder: string;
  port: number;
}): Promise<{ port: number; close(): Promise<void> }> {
  await mkdir(given.folder, { recursive: true, mode: 0o700 });
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: largest,
    onData: (stream, _session, done) => {
      keep(given.folder, stream).then(() => done(), done);
    },
  });
  const listening = server.listen(given.port, '127.0.0.1');
  await once(listening, 'listening');
  return {
    port: (listening.address() as AddressInfo).port,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

async function keep(folder: string, stream: NodeJS.ReadableStream): Promise<void> {
  const letter = await simpleParser(stream as Parameters<typeof simpleParser>[0]);
  const id = `${new Date().toISOString().replace(/\D/g, '')}-${randomBytes(4).toString('hex')}`;
  const kept = {
    id,
    at: new Date().toISOString(),
    from: addresses(letter.from),
    to: addresses(letter.to),
    subject: letter.subject ?? '',
    messageId: letter.messageId ?? '',
    text: letter.text ?? '',
    html: letter.html || '',
  };
  const file = path.join(folder, `${id}.json`);
  // Whole or not at all: a reader never meets half a letter.
  await writeFile(`${file}.part`, JSON.stringify(kept), { mode: 0o600 });
  await rename(`${file}.part`, file);
}

const addresses = (field: AddressObject | AddressObject[] | undefined): string =>
  [field ?? []]
    .flat()
    .map((one) => one.text)
    .join(', ');
