import { once } from 'node:events';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { buffer } from 'node:stream/consumers';

type Kept = { bytes: Buffer; mime: string; at: Date };
export type FakeS3 = { endpoint: string; bucket: string; kept: Map<string, Kept>; close(): Promise<void> };

/**
 * As much of the S3 protocol as the store uses, on the loopback: PUT, GET, HEAD, DELETE of an object, and the listing in
 * pages of two. Refuses what an older server would not know: chunked bodies with trailing checksums.
 */
export async function fakeS3(): Promise<FakeS3> {
  const bucket = 'test-files';
  const kept = new Map<string, Kept>();
  const answer = async (req: IncomingMessage, res: ServerResponse): Promise<void> => {
    const { pathname, searchParams } = new URL(req.url ?? '/', 'http://fake');
    const [, inBucket, ...rest] = decodeURIComponent(pathname).split('/');
    const key = rest.join('/');
    const refuse = (status: number, code: string) =>
      res
        .writeHead(status, { 'Content-Type': 'application/xml' })
        .end(req.method === 'HEAD' ? undefined : `<Error><Code>${code}</Code><Message>${code}</Message></Error>`);
    if (inBucket !== bucket || !req.headers.authorization?.startsWith('AWS4-HMAC-SHA256 '))
      return void refuse(403, 'AccessDenied');
    if (req.method === 'PUT') {
      if (req.headers['x-amz-trailer'] !== undefined || req.headers['content-length'] === undefined)
        return void refuse(501, 'NotImplemented');
      const bytes = await buffer(req);
      if (bytes.length !== Number(req.headers['content-length'])) return void refuse(400, 'IncompleteBody');
      kept.set(key, { bytes, mime: req.headers['content-type'] ?? '', at: new Date() });
      return void res.writeHead(200, { ETag: '"fake"' }).end();
    }
    if (req.method === 'DELETE') {
      kept.delete(key);
      return void res.writeHead(204).end();
    }
    if (key === '') return void res.writeHead(200, { 'Content-Type': 'application/xml' }).end(page(kept, searchParams));
    const found = kept.get(key);
    if (!found) return void refuse(404, 'NoSuchKey');
    res.writeHead(200, {
      'Content-Length': found.bytes.length,
      'Content-Type': found.mime,
      'Last-Modified': found.at.toUTCString(),
    });
    res.end(req.method === 'HEAD' ? undefined : found.bytes);
  };
  const server = createServer((req, res) => {
    answer(req, res).catch((error: unknown) => res.destroy(error as Error));
  }).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const close = async () => {
    server.closeAllConnections();
    server.close();
    await once(server, 'close');
  };
  return { endpoint: `http://127.0.0.1:${(server.address() as AddressInfo).port}`, bucket, kept, close };
}

function page(kept: FakeS3['kept'], query: URLSearchParams): string {
  const prefix = query.get('prefix') ?? '';
  const all = [...kept.keys()].filter((key) => key.startsWith(prefix)).sort();
  const from = Number(query.get('continuation-token') ?? 0);
  const keys = all.slice(from, from + 2);
  const isCut = from + 2 < all.length;
  const contents = keys.map(
    (key) => `<Contents><Key>${key}</Key><LastModified>${kept.get(key)?.at.toISOString()}</LastModified></Contents>`,
  );
  const next = isCut ? `<NextContinuationToken>${from + 2}</NextContinuationToken>` : '';
  return `<ListBucketResult><IsTruncated>${isCut}</IsTruncated>${next}${contents.join('')}</ListBucketResult>`;
}
