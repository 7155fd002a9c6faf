import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import type { ReplyOf } from '#contracts/endpoint.ts';
import { readMailboxLetter as contract } from '#contracts/mailbox.ts';
import { notFound } from '../errors.ts';

export type KeptLetter = ReplyOf<typeof contract>;

const newest = 200;

/** The newest letters that the local mail server kept, newest first. Their file names begin with the time. */
export async function listMailbox(folder: string): Promise<Omit<KeptLetter, 'text' | 'html'>[]> {
  const files = (await readdir(folder)).filter((file) => file.endsWith('.json'));
  const letters = await Promise.all(
    files
      .sort()
      .slice(-newest)
      .map((file) => readLetter(folder, file)),
  );
  return letters.reverse().map(({ text: _text, html: _html, ...head }) => head);
}

/** @throws {Refusal} not-found. The id has passed the contract's pattern, so it names no other folder. */
export async function readMailboxLetter(folder: string, id: string): Promise<KeptLetter> {
  const file = `${id}.json`;
  if (!(await readdir(folder)).includes(file)) throw notFound();
  return readLetter(folder, file);
}

const readLetter = async (folder: string, file: string): Promise<KeptLetter> =>
  contract.reply.parse(JSON.parse(await readFile(path.join(folder, file), 'utf8')));
