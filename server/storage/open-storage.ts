import path from 'node:path';
import type { Config } from '../config.ts';
import { diskStorage } from './disk.ts';
import { s3Storage } from './s3.ts';
import type { Storage } from './storage.ts';

/** The bucket that is named, else a folder. */
export function openStorage(config: Config): Storage {
  const { S3_BUCKET, S3_REGION, S3_ENDPOINT, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = config;
  if (S3_BUCKET === undefined) return diskStorage(path.resolve(config.FILES_DIR));
  return s3Storage({
    bucket: S3_BUCKET,
    region: S3_REGION,
    endpoint: S3_ENDPOINT,
    credentials:
      S3_ACCESS_KEY_ID !== undefined && S3_SECRET_ACCESS_KEY !== undefined
        ? { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY }
        : undefined,
  });
}
