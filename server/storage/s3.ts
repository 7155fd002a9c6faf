import type { Readable } from 'node:stream';
import { checkedKey, type Storage } from './storage.ts';

export type S3Settings = {
  bucket: string;
  region: string;
  /** Of a server that is not the SDK's own default. */
  endpoint?: string | undefined;
  /** Absent: the SDK looks for them itself, as in the machine's role. */
  credentials?: { accessKeyId: string; secretAccessKey: string } | undefined;
};

/** Against a server that no longer answers. */
const patience = 120_000;

/** Objects in a bucket of any server that speaks the S3 protocol. */
export function s3Storage(settings: S3Settings): Storage {
  let opened: ReturnType<typeof connect> | undefined;
  const s3 = () => (opened ??= connect(settings));
  const at = (key: string) => ({ Bucket: settings.bucket, Key: checkedKey(key) });
  const inTime = () => ({ abortSignal: AbortSignal.timeout(patience) });
  return {
    async put(key, body, { bytes, mime }) {
      const command = { ...at(key), Body: body, ContentLength: bytes, ContentType: mime };
      const { sdk, client } = await s3();
      // The SDK would wait for ever for the rest of a body that breaks off.
      const torn = new AbortController();
      body.once('error', () => torn.abort());
      const abortSignal = AbortSignal.any([torn.signal, AbortSignal.timeout(patience)]);
      await client.send(new sdk.PutObjectCommand(command), { abortSignal });
    },
    async get(key) {
      const object = at(key);
      const { sdk, client, orNull } = await s3();
      const found = await orNull(client.send(new sdk.GetObjectCommand(object), inTime()));
      return (found?.Body as Readable | undefined) ?? null;
    },
    async head(key) {
      const object = at(key);
      const { sdk, client, orNull } = await s3();
      const found = await orNull(client.send(new sdk.HeadObjectCommand(object), inTime()));
      return found && { bytes: found.ContentLength ?? 0, changedAt: found.LastModified ?? new Date(0) };
    },
    async delete(key) {
      const object = at(key);
      const { sdk, client } = await s3();
      await client.send(new sdk.DeleteObjectCommand(object), inTime());
    },
    async *list() {
      const { sdk, client } = await s3();
      let next: string | undefined;
      do {
        const wanted = { Bucket: settings.bucket, Prefix: 'shop/', ContinuationToken: next };
        const page = await client.send(new sdk.ListObjectsV2Command(wanted), inTime());
        for (const { Key: key, LastModified: changedAt } of page.Contents ?? [])
          if (key !== undefined && changedAt !== undefined) yield { key, changedAt };
        next = page.IsTruncated ? page.NextContinuationToken : undefined;
      } while (next !== undefined);
    },
  };
}

/** Loaded at the first use: most shops have a folder and never need the SDK. */
async function connect({ region, endpoint, credentials }: S3Settings) {
  const sdk = await import('@aws-sdk/client-s3');
  const client = new sdk.S3Client({
    region,
    // Newer checksums are unknown to other servers of the protocol (aws/aws-sdk-js-v3#6819).
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 3,
    ...(endpoint === undefined ? {} : { endpoint, forcePathStyle: true }),
    ...(credentials === undefined ? {} : { credentials }),
  });
  const orNull = async <T>(answer: Promise<T>): Promise<T | null> => {
    try {
      return await answer;
    } catch (error) {
      if (error instanceof sdk.S3ServiceException && error.$metadata.httpStatusCode === 404) return null;
      throw error;
    }
  };
  return { sdk, client, orNull };
}
