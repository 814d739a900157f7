import { z } from 'zod';

const KNOWN_LOCAL_SECRET = 'local';
const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]']);

const flagged = (what: string) => z.string({ error: `${what} is missing` }).min(1, `${what} is missing`);
const whole = (otherwise: number, least: number, most: number) =>
  z.coerce.number().int().min(least).max(most).default(otherwise);

/** Every variable that Weepmark reads, for every mode. */
export const environmentSchema = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('production'),
  WEEPMARK_MODE: z.enum(['local', 'production', 'test']).default('production'),
  PUBLIC_URL: z.url({ error: 'PUBLIC_URL is missing or not an address' }),
  SESSION_SECRET: flagged('SESSION_SECRET'),
  DATABASE_URL: flagged('DATABASE_URL').refine(
    (text) => /^(mariadb|mysql):\/\//.test(text),
    'DATABASE_URL must begin with mariadb://',
  ),
  S3_ENDPOINT: z.url({ error: 'S3_ENDPOINT is not an address' }).optional(),
  S3_REGION: z.string().default('us-east-1'),
  S3_BUCKET: flagged('S3_BUCKET'),
  S3_ACCESS_KEY_ID: flagged('S3_ACCESS_KEY_ID'),
  S3_SECRET_ACCESS_KEY: flagged('S3_SECRET_ACCESS_KEY'),
  SMTP_URL: flagged('SMTP_URL').refine(
    (text) => /^smtps?:\/\//.test(text),
    'SMTP_URL must begin with smtp:// or smtps://',
  ),
  MAIL_FROM: z.string().default('Weepmark <weepmark@localhost>'),
  MAILBOX_DIR: z.string().optional(),
  BCRYPT_COST: whole(12, 4, 15),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  IMAGE_WORKERS: whole(2, 1, 16),
  IMAGE_MAX_MEGAPIXELS: whole(40, 1, 200),
});

export type Environment = z.infer<typeof environmentSchema>;

type Source = Record<string, string | undefined>;

/** What is there but too weak, or does not belong, in production. */
function productionFaults(source: Source): string[] {
  const { SESSION_SECRET: secret, PUBLIC_URL, DATABASE_URL = '', MAILBOX_DIR, BCRYPT_COST } = source;
  const faults: string[] = [];
  if (secret && (secret.length < 32 || secret.startsWith(KNOWN_LOCAL_SECRET) || new Set(secret).size < 8)) {
    faults.push('SESSION_SECRET is weak: use at least 32 random characters');
  }
  const address = PUBLIC_URL && URL.canParse(PUBLIC_URL) ? new URL(PUBLIC_URL) : null;
  if (address && address.protocol !== 'https:' && !LOOPBACK.has(address.hostname)) {
    faults.push('PUBLIC_URL must begin with https://');
  }
  if (URL.canParse(DATABASE_URL) && new URL(DATABASE_URL).password === '')
    faults.push('DATABASE_URL has no password');
  if (MAILBOX_DIR) faults.push('MAILBOX_DIR belongs to the mail fake and must not be set');
  if (Number(BCRYPT_COST ?? 12) < 10) faults.push('BCRYPT_COST is weak: use at least 10');
  return faults;
}

/** Reads the environment; a fault throws one error that names everything missing or weak. */
export function readEnvironment(source: Source): Environment {
  const parsed = environmentSchema.safeParse(source);
  const issues = parsed.success ? [] : parsed.error.issues;
  const faults = [
    ...issues.map(({ path, message }) =>
      message.includes(String(path[0])) ? message : `${path.join('.')}: ${message}`,
    ),
    ...((source.WEEPMARK_MODE ?? 'production') === 'production' ? productionFaults(source) : []),
  ];
  if (parsed.success && faults.length === 0) return parsed.data;
  throw new Error(
    `Weepmark does not start:\n${[...new Set(faults)].map((fault) => `  - ${fault}`).join('\n')}`,
  );
}
