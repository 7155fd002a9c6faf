import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Response } from 'express';
import { contentDisposition } from './content-disposition.ts';

export type SentFile = { name: string; mime: string; bytes: number; body: Readable };

/** What a browser shows by itself without running anything of it. */
const shown = ['application/pdf', 'image/png', 'image/jpeg'];

/**
 * Sends a file. Never as anything but what it is, never into another site's page (helmet: nosniff, same-origin resource
 * policy), and kept by the reader's own browser only. A file under an id never changes.
 */
export async function sendFile(res: Response, { name, mime, bytes, body }: SentFile, open: boolean): Promise<void> {
  res.set({
    'Content-Type': mime,
    'Content-Length': String(bytes),
    'Content-Disposition': contentDisposition(open && shown.includes(mime) ? 'inline' : 'attachment', name),
    'Cache-Control': 'private, max-age=3600',
    'X-Content-Type-Options': 'nosniff',
    'Cross-Origin-Resource-Policy': 'same-origin',
  });
  try {
    await pipeline(body, res);
  } catch (error) {
    // A reader who leaves in the middle is no fault; a store that does has cut the answer short, which the length shows.
    if ((error as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error;
  }
}
