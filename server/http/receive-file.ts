import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { Request, Response } from 'express';
import { fileTypeFromFile } from 'file-type';
import multer from 'multer';
import { v7 as uuid } from 'uuid';
import { mostUploadBytes } from '#contracts/attachments.ts';
import { Refusal } from '../errors.ts';
import { cleanFileName, endingOf } from '../services/clean-file-name.ts';
import type { ReceivedFile } from '../services/keep-file.ts';

/** What is taken, by what the bytes say; the name may end in one of these or in nothing. */
const endings: Record<string, readonly string[]> = {
  'application/pdf': ['pdf'],
  'image/png': ['png'],
  'image/jpeg': ['jpg', 'jpeg'],
};
/** A part's head and the boundary around the file. */
const wrapping = 16_384;

const badFile = (message: string) => new Refusal('bad-request', { fields: [{ path: 'body.file', message }] });

/**
 * Takes the one file of a multipart request into a folder of its own, hands it to `use` and removes the folder whatever
 * happens. The kind is what the bytes say, never what the request claims.
 * @throws {Refusal} bad-request for a torn or wrong form, too-large, wrong-kind
 */
export async function receiveFile<T>(
  req: Request,
  res: Response,
  kinds: readonly string[],
  use: (file: ReceivedFile) => Promise<T>,
): Promise<T> {
  if (!/^multipart\/form-data\s*;/i.test(req.get('content-type') ?? ''))
    throw new Refusal('bad-request', {
      fields: [{ path: 'headers.content-type', message: 'must be multipart/form-data' }],
    });
  if (Number(req.get('content-length') ?? 0) > mostUploadBytes + wrapping) {
    // Nothing of it is read, so the connection is of no more use.
    res.set('Connection', 'close');
    throw new Refusal('too-large');
  }
  const folder = await mkdtemp(path.join(tmpdir(), 'ovenbird-upload-'));
  try {
    return await use(await looked(await parsed(req, res, folder), kinds));
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

type Parsed = { path: string; size: number; originalname: string };

function parsed(req: Request, res: Response, folder: string): Promise<Parsed> {
  const take = multer({
    storage: multer.diskStorage({ destination: folder, filename: (_req, _file, done) => done(null, 'file') }),
    limits: {
      fileSize: mostUploadBytes,
      files: 1,
      fields: 0,
      parts: 1,
      fieldNameSize: 40,
      fieldSize: 1,
      headerPairs: 20,
    },
    defParamCharset: 'utf8',
  }).single('file');
  return new Promise((resolve, reject) => {
    take(req, res, (error: unknown) => {
      if (error) reject(refusalOf(error));
      else if (!req.file || req.file.size === 0) reject(badFile('no file came'));
      else resolve(req.file);
    });
  });
}

/** Whatever the parser minds is a fault of the form; what the disk minds is ours. */
function refusalOf(error: unknown): Error {
  if (error instanceof multer.MulterError)
    return error.code === 'LIMIT_FILE_SIZE' ? new Refusal('too-large') : badFile(error.code);
  if (error instanceof Error && 'code' in error && 'syscall' in error) return error;
  return badFile('the form is torn');
}

async function looked({ path: at, size, originalname }: Parsed, kinds: readonly string[]): Promise<ReceivedFile> {
  const mime = (await fileTypeFromFile(at))?.mime ?? '';
  const allowed = endings[mime];
  const name = cleanFileName(originalname, `file.${allowed?.[0] ?? 'bin'}`);
  const ending = endingOf(name);
  if (!kinds.includes(mime) || !allowed || (ending !== null && !allowed.includes(ending)))
    throw new Refusal('wrong-kind', { fields: [{ path: 'body.file', message: kinds.join(', ') }] });
  const hash = createHash('sha256');
  await pipeline(createReadStream(at), hash);
  return {
    id: uuid(),
    name: ending === null ? `${name}.${allowed[0]}` : name,
    mime,
    bytes: size,
    sha256: hash.digest(),
    open: () => createReadStream(at),
  };
}
