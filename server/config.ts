import * as z from 'zod';

const flag = z.enum(['true', 'false']).transform((text) => text === 'true');
const url = (...protocols: string[]) =>
  z
    .string()
    .refine(
      (text) => URL.canParse(text) && protocols.includes(new URL(text).protocol),
      `must be a ${protocols.join(' or ')} address`,
    );

const environment = z
  .object({
    NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
    HOST: z.string().default('127.0.0.1'),
    PORT: z.coerce.number().int().min(0).max(65_535).default(5180),
    /** The address people reach the shop at; links in letters and the cookie's kind follow from it. */
    PUBLIC_URL: url('http:', 'https:').optional(),
    DATABASE_URL: url('postgres:', 'postgresql:'),
    DATABASE_POOL: z.coerce.number().int().min(2).max(200).default(10),
    SESSION_SECRET: z.string().min(32, 'must have 32 characters or more'),
    /** A session ends after this long without a request. */
    SESSION_IDLE_MINUTES: z.coerce.number().int().min(1).max(10_080).default(720),
    /** And after this long whatever happens. */
    SESSION_ABSOLUTE_HOURS: z.coerce.number().int().min(1).max(720).default(168),
    SMTP_URL: url('smtp:', 'smtps:').optional(),
    MAIL_FROM: z.string().default('Ovenbird <ovenbird@localhost>'),
    /** Folder of the local mailbox; set only where the local SMTP server runs. */
    DEV_MAILBOX_DIR: z.string().optional(),
    /** Folder of the files that people put in, unless a bucket is named. */
    FILES_DIR: z.string().default('.data/files'),
    /** A bucket of any server that speaks the S3 protocol, instead of the folder. */
    S3_BUCKET: z
      .string()
      .regex(/^[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/, 'must be the name of a bucket')
      .optional(),
    S3_REGION: z.string().default('us-east-1'),
    S3_ENDPOINT: url('http:', 'https:').optional(),
    S3_ACCESS_KEY_ID: z.string().optional(),
    S3_SECRET_ACCESS_KEY: z.string().optional(),
    /** How many files a shop may keep, and how many megabytes they may take together. */
    SHOP_FILES: z.coerce.number().int().min(1).max(1_000_000).default(5_000),
    SHOP_FILES_MB: z.coerce.number().int().min(1).max(10_000_000).default(2_048),
    /** Whether strangers may open shops; unset it is closed in production. */
    SIGN_UP: z.enum(['open', 'closed']).optional(),
    WEB_ROOT: z.string().default('dist/web'),
    LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
    /** True behind exactly one proxy that sets X-Forwarded-For. */
    BEHIND_PROXY: flag.default(false),
  })
  .refine((env) => (env.S3_ACCESS_KEY_ID === undefined) === (env.S3_SECRET_ACCESS_KEY === undefined), {
    path: ['S3_SECRET_ACCESS_KEY'],
    message: 'goes together with S3_ACCESS_KEY_ID',
  });

export type Config = Readonly<Omit<z.output<typeof environment>, 'PUBLIC_URL'> & { PUBLIC_URL: string }>;

export class ConfigFault extends Error {}

/** @throws {ConfigFault} naming every variable that is wrong, not only the first. */
export function readConfig(env: Record<string, string | undefined>): Config {
  const given = Object.fromEntries(Object.entries(env).filter(([, value]) => value !== ''));
  const parsed = environment.safeParse(given);
  if (!parsed.success) {
    const faults = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new ConfigFault(`Configuration: ${faults.join('; ')}`);
  }
  const publicUrl = parsed.data.PUBLIC_URL ?? `http://${parsed.data.HOST}:${parsed.data.PORT}`;
  return { ...parsed.data, PUBLIC_URL: publicUrl.replace(/\/$/, '') };
}
